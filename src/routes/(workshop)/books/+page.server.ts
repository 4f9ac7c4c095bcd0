import { guard, orPageError } from '$lib/server/http/guard';
import { listBooks } from '$lib/server/services/books';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.read');
	return { books: await orPageError(listBooks(person)) };
};
