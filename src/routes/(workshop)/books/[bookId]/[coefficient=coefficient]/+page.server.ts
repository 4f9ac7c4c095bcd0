import { error } from '@sveltejs/kit';
import { coefficientChangeSchema, readCoefficientPath } from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { changeCoefficient } from '$lib/server/services/book-changes';
import { getBook } from '$lib/server/services/books';
import type { Actions, PageServerLoad } from './$types';

/** The address holds one: its matcher has looked. */
const readPath = (path: string) => readCoefficientPath(path)!;

async function find(person: SignedInPerson, params: { bookId: string; coefficient: string }) {
	const book = await orPageError(getBook(person, pageId(params.bookId)));
	const { group, key } = readPath(params.coefficient);
	const coefficient = book.coefficients.find((each) => each.group === group && each.key === key);
	if (!coefficient) error(404, { message: 'There is no such coefficient in this book.' });
	return { book, coefficient };
}

/** As the form takes it: what was fitted becomes somebody’s word when they change it by hand, with a source of their own. */
async function toForm(person: SignedInPerson, params: { bookId: string; coefficient: string }) {
	const { book, coefficient } = await find(person, params);
	const { value, source, origin } = coefficient;
	const said = origin === 'fitted' ? { source: '', origin: 'judgement' as const } : { source, origin };
	return { value, ...said, version: book.version };
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.write');
	const { book, coefficient } = await find(person, event.params);
	const { coefficients: _, contradictions, ...row } = book;
	return {
		book: row,
		coefficient,
		contradictions: contradictions.filter(({ paths }) => paths.includes(event.params.coefficient)),
		form: await loadForm(coefficientChangeSchema, await toForm(person, event.params))
	};
};

export const actions: Actions = {
	default: (event) =>
		saveEdited(event, {
			action: 'books.write',
			schema: coefficientChangeSchema,
			save: async (person, change) => {
				const bookId = pageId(event.params.bookId);
				await changeCoefficient(person, bookId, readPath(event.params.coefficient), change);
				return `/books/${bookId}?saved`;
			},
			newest: (person) => toForm(person, event.params)
		})
};
