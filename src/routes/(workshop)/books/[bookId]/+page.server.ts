import { redirect } from '@sveltejs/kit';
import { bookMoveSchema } from '$lib/schemas/books';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { mayDo } from '$lib/server/policies';
import { isByOwnHand, moveBook } from '$lib/server/services/book-changes';
import { getBook, listBooks } from '$lib/server/services/books';
import { listReruns } from '$lib/server/services/reruns/reruns';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.read');
	const bookId = pageId(event.params.bookId);
	const [book, books, reruns, isOwn] = await Promise.all([
		orPageError(getBook(person, bookId)),
		orPageError(listBooks(person)),
		orPageError(listReruns(person, bookId)),
		orPageError(isByOwnHand(person, bookId))
	]);
	return {
		book,
		reruns,
		others: books.filter(({ id }) => id !== book.id),
		mayWrite: mayDo(person, 'books.write'),
		isOwn,
		isSaved: event.url.searchParams.has('saved')
	};
};

export const actions: Actions = {
	move: async (event) => {
		const person = guard(event, 'books.write');
		const bookId = pageId(event.params.bookId);
		// Whose book it is comes before what is to be done with it.
		await orPageError(getBook(person, bookId));
		const sent = Object.fromEntries(await readPageForm(event.request));
		const move = async () =>
			moveBook(person, bookId, validate(bookMoveSchema, { ...sent, version: Number(sent.version) }));
		await orPageError(move());
		redirect(303, `/books/${bookId}?saved`);
	}
};
