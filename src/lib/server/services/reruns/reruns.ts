import { col, fn, type Transaction } from 'sequelize';
import type { BookMove } from '$lib/schemas/books';
import type { SignedInPerson } from '$lib/schemas/people';
import type { RerunMove, RerunProgress, RerunView } from '$lib/schemas/reruns';
import { CoefficientBook, Person, Rerun, RerunItem } from '../../db/models';
import { inTransaction, outsideTransaction } from '../../db/transaction';
import { AppError, notFound } from '../../errors';
import { allow } from '../../policies';
import { presentProgress, presentRerun, type ItemCount } from '../../presenters/reruns';
import { recordBy } from '../audit';
import { follow } from '../follow';
import { putInConcerned } from './concerned';
import { continueReruns } from './run-reruns';

/**
 * Begins to assess again what a book concerns that came into force or was withdrawn from it, in the transaction of that
 * move. Where there is nothing, there is no re-run.
 */
export async function beginRerun(
	person: SignedInPerson,
	book: CoefficientBook,
	occasion: Exclude<BookMove['to'], 'on-trial'>,
	transaction: Transaction
): Promise<void> {
	const { id: bookId, workshopId } = book;
	const rerun = await Rerun.create({ workshopId, bookId, occasion, begunBy: person.id }, { transaction });
	await putInConcerned(rerun, book, transaction);
	const count = await RerunItem.count({ where: { rerunId: rerun.id }, transaction });
	if (count === 0) return rerun.destroy({ transaction });
	const detail = { book: book.number, assessments: count };
	await recordBy(person, 'rerun.begun', { type: 'rerun', id: rerun.id }, transaction, detail);
	transaction.afterCommit(() => outsideTransaction(continueReruns));
}

export async function findRerun(
	{ workshopId }: SignedInPerson,
	rerunId: number,
	transaction?: Transaction
): Promise<Rerun> {
	const lock = transaction ? { transaction, lock: transaction.LOCK.UPDATE } : {};
	const rerun = await Rerun.findOne({ where: { id: rerunId, workshopId }, ...lock });
	if (!rerun) throw notFound('re-run');
	return rerun;
}

async function countItems(rerunIds: number[]): Promise<Map<number, ItemCount[]>> {
	const rows = (await RerunItem.findAll({
		attributes: [
			...['rerunId', 'state', 'verdictChanged'],
			[fn('COUNT', col('id')), 'count'],
			[fn('COUNT', col('told_at')), 'told']
		],
		where: { rerunId: rerunIds },
		group: ['rerun_id', 'state', 'verdict_changed'],
		raw: true
	})) as unknown as (ItemCount & { rerunId: number })[];
	const counts = new Map<number, ItemCount[]>(rerunIds.map((id) => [id, []]));
	for (const { rerunId, ...count } of rows) counts.get(rerunId)?.push(count);
	return counts;
}

async function present(reruns: Rerun[]): Promise<RerunView[]> {
	const counts = await countItems(reruns.map(({ id }) => id));
	const books = await CoefficientBook.findAll({ where: { id: reruns.map(({ bookId }) => bookId) } });
	const people = await Person.findAll({ where: { id: reruns.map(({ begunBy }) => begunBy) } });
	return reruns.map((rerun) =>
		presentRerun(rerun, presentProgress(rerun, counts.get(rerun.id)!), {
			book: books.find(({ id }) => id === rerun.bookId)!,
			begunBy: people.find(({ id }) => id === rerun.begunBy)?.name ?? ''
		})
	);
}

const MOST_LISTED = 50;

/** The workshop's re-runs, or those of one book, the newest first. */
export async function listReruns(person: SignedInPerson, bookId?: number): Promise<RerunView[]> {
	const { workshopId } = allow(person, 'reruns.read');
	const where = { workshopId, ...(bookId === undefined ? {} : { bookId }) };
	return present(await Rerun.findAll({ where, order: [['id', 'DESC']], limit: MOST_LISTED }));
}

export async function getRerun(person: SignedInPerson, rerunId: number): Promise<RerunView> {
	allow(person, 'reruns.read');
	const [view] = await present([await findRerun(person, rerunId)]);
	return view!;
}

export async function getRerunProgress(person: SignedInPerson, rerunId: number): Promise<RerunProgress> {
	allow(person, 'reruns.read');
	const rerun = await findRerun(person, rerunId);
	return presentProgress(rerun, (await countItems([rerunId])).get(rerunId)!);
}

/** Tells how far a re-run is until it is at its end, or nobody listens any more. */
export const followRerun = (
	person: SignedInPerson,
	rerunId: number,
	tell: (progress: RerunProgress) => void,
	isOver: () => boolean
): Promise<void> =>
	follow(
		() => getRerunProgress(person, rerunId),
		({ state }) => state !== 'running',
		tell,
		isOver
	);

/** Stops a re-run, whose rest then stays as it was assessed before, or lets it go on. */
export async function moveRerun(
	person: SignedInPerson,
	rerunId: number,
	{ to }: RerunMove
): Promise<RerunView> {
	allow(person, 'reruns.write');
	await inTransaction(async (transaction) => {
		const rerun = await findRerun(person, rerunId, transaction);
		if (rerun.state === 'done') throw new AppError('conflict', 'This re-run is at its end already.');
		if (rerun.state === to) return;
		await rerun.update({ state: to, endedAt: to === 'cancelled' ? new Date() : null }, { transaction });
		await recordBy(person, `rerun.${to}`, { type: 'rerun', id: rerunId }, transaction);
		transaction.afterCommit(() => outsideTransaction(continueReruns));
	});
	return getRerun(person, rerunId);
}
