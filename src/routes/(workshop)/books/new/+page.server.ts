import { bookDraftSchema } from '$lib/schemas/books';
import { idSchema } from '$lib/schemas/fields';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { draftBook } from '$lib/server/services/book-changes';
import { listBooks } from '$lib/server/services/books';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.write');
	const books = await orPageError(listBooks(person));
	const asked = idSchema.safeParse(event.url.searchParams.get('from') ?? undefined).data;
	const fromBookId = asked ?? books.find(({ state }) => state === 'in-force')?.id;
	return { books, form: await loadForm(bookDraftSchema, { ...(fromBookId ? { fromBookId } : {}) }) };
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'books.write',
			schema: bookDraftSchema,
			save: async (person, draft) => `/books/${(await draftBook(person, draft)).id}`
		})
};
