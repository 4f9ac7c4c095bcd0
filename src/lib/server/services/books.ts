import type { Transaction } from 'sequelize';
import {
	closestBook,
	type BookRow,
	type BookView,
	type CoefficientView,
	type MountCase
} from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import { findContradictions, ScenarioError, type Contradiction } from '$lib/thermal';
import type { CoefficientBook as Coefficients } from '$lib/thermal/survey';
import { Coefficient, CoefficientBook, Person } from '../db/models';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import {
	presentBook,
	presentBookRow,
	presentCoefficient,
	presentContradiction,
	type NameOf
} from '../presenters/books';
import { record } from './audit';
import { COEFFICIENT_FIELDS, coefficientField, originOf, sourceOf } from './coefficient-sources';

/** The names of those whose hands books went through. */
async function namesFor(books: readonly CoefficientBook[]): Promise<NameOf> {
	const ids = books.flatMap(({ madeBy, inForceBy }) =>
		[madeBy, inForceBy].filter((id) => typeof id === 'number')
	);
	const people = await Person.findAll({ where: { id: [...new Set(ids)] }, attributes: ['id', 'name'] });
	const names = new Map(people.map(({ id, name }) => [id, name]));
	return (id) => names.get(id ?? 0) ?? '';
}

/** What the engine would refuse these values for: one out of its own limits, or those that contradict each other. */
function faultsOf(coefficients: CoefficientView[]): Contradiction[] {
	try {
		return findContradictions(coefficientsOf({ coefficients }));
	} catch (error) {
		if (error instanceof ScenarioError) return [{ ...error, against: null }];
		throw error;
	}
}

export async function withCoefficients(book: CoefficientBook): Promise<BookView> {
	const rows = await Coefficient.findAll({ where: { bookId: book.id }, order: [['id', 'ASC']] });
	const coefficients = rows.map((row) =>
		presentCoefficient(row, coefficientField(row.fieldGroup, row.fieldKey))
	);
	const contradictions = faultsOf(coefficients).map((each) => presentContradiction(each, coefficients));
	return presentBook(book, coefficients, contradictions, await namesFor([book]));
}

export async function listBooks(person: SignedInPerson): Promise<BookRow[]> {
	allow(person, 'books.read');
	const books = await CoefficientBook.findAll({
		where: { workshopId: person.workshopId },
		order: [['number', 'DESC']]
	});
	const nameOf = await namesFor(books);
	return books.map((book) => presentBookRow(book, nameOf));
}

export async function findBook(
	{ workshopId }: SignedInPerson,
	bookId: number,
	transaction?: Transaction
): Promise<CoefficientBook> {
	const where = { id: bookId, workshopId };
	const lock = transaction ? { transaction, lock: transaction.LOCK.UPDATE } : {};
	const book = await CoefficientBook.findOne({ where, ...lock });
	if (!book) throw notFound('book');
	return book;
}

export async function getBook(person: SignedInPerson, bookId: number): Promise<BookView> {
	allow(person, 'books.read');
	return withCoefficients(await findBook(person, bookId));
}

/** The books in force of a workshop: one for everything, and those for an engine layout or a kind of position. */
export const listInForce = (workshopId: number): Promise<CoefficientBook[]> =>
	CoefficientBook.findAll({ where: { workshopId, state: 'in-force' } });

export const noBookInForce = (): AppError =>
	new AppError('not_ready', 'No coefficient book is in force in this workshop, so nothing can be assessed.');

/** The book that a mount's new assessment and its live curve are made with: whoever may assess may know it. */
export async function bookInForce(person: SignedInPerson, mount: MountCase): Promise<BookView> {
	allow(person, 'assessments.run');
	const book = closestBook(await listInForce(person.workshopId), mount);
	if (!book) throw noBookInForce();
	return withCoefficients(book);
}

/** A book's values as the engine takes them: by group, then key. */
export function coefficientsOf({ coefficients }: Pick<BookView, 'coefficients'>): Coefficients {
	const groups: Coefficients = {};
	for (const { group, key, value } of coefficients) (groups[group] ??= {})[key] = value;
	return groups;
}

/** A workshop's first book: the thermal model's own values, each with what stands behind it, in force at once. */
export async function createFirstBook(workshopId: number, transaction: Transaction): Promise<BookView> {
	const book = await CoefficientBook.create(
		{
			workshopId,
			number: 1,
			name: 'Thermal model defaults',
			state: 'in-force',
			note: 'The values that the thermal model starts with. Nothing in it has been measured on a vehicle of this workshop.'
		},
		{ transaction }
	);
	const rows = COEFFICIENT_FIELDS.map((field) => ({
		bookId: book.id,
		fieldGroup: field.group,
		fieldKey: field.key,
		value: field.default,
		unit: field.unit,
		origin: originOf(field),
		source: sourceOf(field)
	}));
	await Coefficient.bulkCreate(rows, { transaction });
	await record(
		{ workshopId, personId: null, action: 'book.in-force', subjectType: 'book', subjectId: book.id },
		transaction
	);
	return withCoefficients(book);
}
