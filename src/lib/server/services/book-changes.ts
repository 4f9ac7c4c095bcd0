import type { Transaction } from 'sequelize';
import {
	isGeneral,
	type BookComparison,
	type BookDraft,
	type BookMove,
	type BookState,
	type BookView,
	type CoefficientChange
} from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import type { NumberField } from '$lib/thermal/vehicle/scenario-fields';
import { AuditEntry, Coefficient, CoefficientBook } from '../db/models';
import { inTransaction } from '../db/transaction';
import { AppError, notFound } from '../errors';
import { allow } from '../policies';
import { presentComparison } from '../presenters/books';
import { recordBy } from './audit';
import { requireConsistent } from './book-consistency';
import { findBook, getBook, withCoefficients } from './books';
import { coefficientField } from './coefficient-sources';
import { saveVersioned } from './records';
import { beginRerun } from './reruns/reruns';

const subjectOf = ({ id }: CoefficientBook) => ({ type: 'book', id });

/** Begins a draft with the values of another book, whichever state that is in. */
export async function draftBook(
	person: SignedInPerson,
	{ fromBookId, name, note, engineLayout = 'any', positionKind = 'any' }: BookDraft
): Promise<BookView> {
	const { workshopId } = allow(person, 'books.write');
	return inTransaction(async (transaction) => {
		// All books of the workshop, so that two who begin at once get two numbers.
		const lock = transaction.LOCK.UPDATE;
		const books = await CoefficientBook.findAll({ where: { workshopId }, transaction, lock });
		const from = books.find(({ id }) => id === fromBookId);
		if (!from) throw notFound('book');
		const number = Math.max(...books.map((each) => each.number)) + 1;
		const row = {
			...{ workshopId, number, name, note, engineLayout, positionKind, fromBookId },
			...{ state: 'draft' as const, madeBy: person.id }
		};
		const book = await CoefficientBook.create(row, { transaction });
		const values = await Coefficient.findAll({
			where: { bookId: from.id },
			order: [['id', 'ASC']],
			transaction
		});
		await Coefficient.bulkCreate(
			values.map(({ fieldGroup, fieldKey, value, unit, origin, fitId = null, source }) => ({
				...{ bookId: book.id, fieldGroup, fieldKey, value, unit, origin, fitId, source }
			})),
			{ transaction }
		);
		await recordBy(person, 'book.drafted', subjectOf(book), transaction, { from: from.number, name });
		return withCoefficients(book);
	});
}

function requireWithin(
	{ meaning, min, max, minExclusive, maxExclusive, unit }: NumberField,
	value: number
): void {
	const above = minExclusive ? value > min : value >= min;
	const below = maxExclusive ? value < max : value <= max;
	if (above && below) return;
	const from = `${minExclusive ? 'more than' : 'at least'} ${min}`;
	const to = `${maxExclusive ? 'less than' : 'at most'} ${max}`;
	const message =
		`${meaning.replace(/\.$/, '')} must be ${from} and ${to} ${unit === '-' ? '' : unit}`.trim() + '.';
	throw new AppError('invalid_input', message, [{ path: 'value', message }]);
}

function requireDraft({ state, number }: CoefficientBook): void {
	if (state === 'draft') return;
	throw new AppError(
		'conflict',
		`Book ${number} is no draft any more, so nothing in it can change: begin a new one.`
	);
}

/** Changes one value of a draft, and says where it comes from. */
export async function changeCoefficient(
	person: SignedInPerson,
	bookId: number,
	{ group, key }: { group: string; key: string },
	{ version, ...change }: CoefficientChange
): Promise<BookView> {
	allow(person, 'books.write');
	return inTransaction(async (transaction) => {
		const book = await findBook(person, bookId, transaction);
		const where = { bookId, fieldGroup: group, fieldKey: key };
		const coefficient = await Coefficient.findOne({ where, transaction });
		const field = coefficientField(group, key);
		if (!coefficient || !field) throw notFound('coefficient');
		requireDraft(book);
		requireWithin(field, change.value);
		book.changed('updatedAt', true);
		await saveVersioned(book, 'book', version, { updatedAt: new Date() }, transaction);
		const before = coefficient.value;
		await coefficient.update({ ...change, fitId: null }, { transaction });
		await recordBy(person, 'book.changed', subjectOf(book), transaction, { group, key, before, ...change });
		return withCoefficients(book);
	});
}

/** Where a book may go from each state. */
const WAYS: Readonly<Record<BookState, readonly BookMove['to'][]>> = {
	draft: ['on-trial', 'withdrawn'],
	'on-trial': ['in-force', 'withdrawn'],
	'in-force': ['withdrawn'],
	withdrawn: []
};

const NO_WAY: Readonly<Record<BookState, string>> = {
	draft: 'goes on trial first, where a second person sees it unchanging',
	'on-trial': 'is on trial already',
	'in-force': 'is in force already',
	withdrawn: 'was withdrawn, and stays so: begin a new one from it'
};

function requireWay(book: CoefficientBook, to: BookMove['to']): void {
	const { state, number } = book;
	// Without the one for everything some mounts could not be assessed; in the place of another it comes.
	if (state === 'in-force' && to === 'withdrawn' && isGeneral(book)) {
		throw new AppError(
			'conflict',
			`Book ${number} is in force for everything, and is withdrawn when another one takes its place.`
		);
	}
	if (WAYS[state].includes(to)) return;
	throw new AppError('conflict', `Book ${number} ${NO_WAY[state]}.`);
}

/** What somebody did to a book by which its values are theirs too; empty where nothing. */
async function findHandIn(
	{ id: subjectId, madeBy }: Pick<CoefficientBook, 'id' | 'madeBy'>,
	{ id: personId }: SignedInPerson,
	transaction?: Transaction
): Promise<string> {
	if (madeBy === personId) return 'made this book';
	const changes = { action: 'book.changed', subjectType: 'book', subjectId, personId };
	const count = await AuditEntry.count({ where: changes, ...(transaction ? { transaction } : {}) });
	return count > 0 ? 'changed values in this book' : '';
}

/** Whether a book waits for another than this person to be put in force. */
export async function isByOwnHand(person: SignedInPerson, bookId: number): Promise<boolean> {
	allow(person, 'books.read');
	return (await findHandIn(await findBook(person, bookId), person)) !== '';
}

/** Whose values they are does not put them in force: neither who began the book nor who changed something in it. */
async function requireSecondPerson(
	book: CoefficientBook,
	person: SignedInPerson,
	transaction: Transaction
): Promise<void> {
	const did = await findHandIn(book, person, transaction);
	if (!did) return;
	throw new AppError(
		'conflict',
		`You ${did}: somebody else puts it in force, another engineer or the manager.`
	);
}

/** Of one scope one book is in force. */
async function replaceInForce(
	{ workshopId, engineLayout, positionKind }: CoefficientBook,
	transaction: Transaction
): Promise<number | null> {
	const where = { workshopId, engineLayout, positionKind, state: 'in-force' as const };
	const former = await CoefficientBook.findOne({ where, transaction, lock: transaction.LOCK.UPDATE });
	await former?.update({ state: 'withdrawn' }, { transaction });
	return former?.number ?? null;
}

/** Puts a draft on trial, a book on trial in force, or withdraws either. */
export async function moveBook(
	person: SignedInPerson,
	bookId: number,
	{ to, version }: BookMove
): Promise<BookView> {
	allow(person, 'books.write');
	return inTransaction(async (transaction) => {
		const book = await findBook(person, bookId, transaction);
		const from = book.state;
		requireWay(book, to);
		if (to !== 'withdrawn') await requireConsistent(book);
		if (to === 'in-force') await requireSecondPerson(book, person, transaction);
		const replaced = to === 'in-force' ? await replaceInForce(book, transaction) : null;
		const hands = to === 'in-force' ? { inForceBy: person.id, inForceAt: new Date() } : {};
		await saveVersioned(book, 'book', version, { state: to, ...hands }, transaction);
		const told = replaced === null ? {} : { replaced };
		await recordBy(person, `book.${to}`, subjectOf(book), transaction, { number: book.number, ...told });
		if (to === 'in-force' || (to === 'withdrawn' && from === 'in-force'))
			await beginRerun(person, book, to, transaction);
		return withCoefficients(book);
	});
}

/** What differs between two books. */
export async function compareBooks(
	person: SignedInPerson,
	leftId: number,
	rightId: number
): Promise<BookComparison> {
	return presentComparison(await getBook(person, leftId), await getBook(person, rightId));
}
