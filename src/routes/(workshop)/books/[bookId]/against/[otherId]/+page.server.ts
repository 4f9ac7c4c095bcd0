import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { compareBooks } from '$lib/server/services/book-changes';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.read');
	const [left, right] = [pageId(event.params.bookId), pageId(event.params.otherId)];
	return { comparison: await orPageError(compareBooks(person, left, right)) };
};
