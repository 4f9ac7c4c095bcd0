import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getBook } from '$lib/server/services/books';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.read');
	return { book: await orPageError(getBook(person, pageId(event.params.bookId))) };
};
