import { bookDraftSchema, isGeneral, type BookRow } from '$lib/schemas/books';
import { idSchema } from '$lib/schemas/fields';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { draftBook } from '$lib/server/services/book-changes';
import { listBooks } from '$lib/server/services/books';
import type { Actions, PageServerLoad } from './$types';

const isInForceForAll = (book: BookRow): boolean => book.state === 'in-force' && isGeneral(book);

/** A new book is for what the one is for that it begins from. */
const beginFrom = ({ id: fromBookId, engineLayout, positionKind }: BookRow) => ({
	...{ fromBookId, engineLayout, positionKind }
});

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.write');
	const books = await orPageError(listBooks(person));
	const asked = idSchema.safeParse(event.url.searchParams.get('from') ?? undefined).data;
	const from = books.find(({ id }) => id === asked);
	const begun = from ?? books.find(isInForceForAll) ?? books.find(({ state }) => state === 'in-force');
	return { books, form: await loadForm(bookDraftSchema, begun ? beginFrom(begun) : {}) };
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'books.write',
			schema: bookDraftSchema,
			save: async (person, draft) => `/books/${(await draftBook(person, draft)).id}`
		})
};
