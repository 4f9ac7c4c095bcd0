import { Op } from 'sequelize';
import { closestBook } from '$lib/schemas/books';
import { Assessment, Job, Mount, Rerun, RerunItem, type CoefficientBook } from '../../db/models';
import { outsideTransaction } from '../../db/transaction';
import { logger } from '../../logger';
import { coefficientsOf, listInForce, noBookInForce, withCoefficients } from '../books';
import type { RerunAnswer, RerunTask } from './rerun-inputs';
import { openRerunThreads } from './rerun-threads';
import { storeOutcomes, type Ran } from './store-outcomes';
import type { WorkerPool } from './worker-pool';

/** So many are kept in one transaction. */
const BATCH = 32;

type Threads = WorkerPool<RerunTask, RerunAnswer>;
type Book = RerunTask['book'];

/** The values of books, each read once. */
class Shelf {
	private readonly read = new Map<number, Promise<Book>>();

	valuesOf(book: CoefficientBook): Promise<Book> {
		const known = this.read.get(book.id);
		if (known) return known;
		const reading = withCoefficients(book).then((view) => ({
			...{ number: view.number, name: view.name, coefficients: coefficientsOf(view) }
		}));
		this.read.set(book.id, reading);
		return reading;
	}
}

/** The next items that wait, after those that are under way. */
const nextItems = (rerunId: number, afterId: number): Promise<RerunItem[]> =>
	RerunItem.findAll({
		where: { rerunId, state: 'waiting', id: { [Op.gt]: afterId } },
		order: [['id', 'ASC']],
		limit: BATCH
	});

/** Lets the threads assess some items again, each with the book that is closest to its mount now. */
async function runItems(items: RerunItem[], shelf: Shelf, threads: Threads): Promise<Ran[]> {
	const { workshopId } = items[0]!;
	const [inForce, assessments, mounts, jobs] = await Promise.all([
		listInForce(workshopId),
		Assessment.findAll({
			where: { id: items.map(({ assessmentId }) => assessmentId) },
			attributes: ['id', 'inputs', 'inputsSha256']
		}),
		Mount.findAll({ where: { id: items.map(({ mountId }) => mountId) }, attributes: ['id', 'positionKind'] }),
		Job.findAll({ where: { id: items.map(({ jobId }) => jobId) }, include: ['vehicle'] })
	]);
	const runOne = async ({ id, assessmentId, mountId, jobId }: RerunItem): Promise<Ran> => {
		const { inputs, inputsSha256 } = assessments.find((each) => each.id === assessmentId)!;
		const { positionKind } = mounts.find((each) => each.id === mountId)!;
		const { engineLayout } = jobs.find((each) => each.id === jobId)!.vehicle!;
		const book = closestBook(inForce, { engineLayout, positionKind });
		if (!book) throw noBookInForce();
		const answer = await threads.run({ id, inputs, book: await shelf.valuesOf(book) });
		if ('fault' in answer) {
			logger.error({ err: answer.fault, rerunItemId: id }, 'a mount could not be assessed again');
		}
		return { itemId: id, fromSha256: inputsSha256, bookId: book.id, answer };
	};
	return Promise.all(items.map(runOne));
}

/** Ends a re-run that has nothing left to do. */
async function endWhereDone(rerunId: number): Promise<void> {
	const waiting = await RerunItem.count({ where: { rerunId, state: 'waiting' } });
	if (waiting > 0) return;
	await Rerun.update({ state: 'done', endedAt: new Date() }, { where: { id: rerunId, state: 'running' } });
}

const isRunning = async (rerunId: number): Promise<boolean> =>
	!isStopping && (await Rerun.count({ where: { id: rerunId, state: 'running' } })) > 0;

/** Once through what waits, one batch being kept while the next is run. */
async function passThrough(rerunId: number, shelf: Shelf, threads: Threads): Promise<void> {
	let storing: Promise<void> = Promise.resolve();
	for (let afterId = 0; await isRunning(rerunId);) {
		const items = await nextItems(rerunId, afterId);
		if (items.length === 0) break;
		afterId = items.at(-1)!.id;
		const ran = await runItems(items, shelf, threads);
		await storing;
		storing = storeOutcomes(rerunId, ran);
		// Heard at the next turn; until then it must not count as nobody's.
		storing.catch(() => undefined);
	}
	await storing;
}

async function runOne(rerunId: number, threads: Threads): Promise<void> {
	const shelf = new Shelf();
	// What changed under the hands of a pass waits for the next one.
	while (await isRunning(rerunId)) {
		await passThrough(rerunId, shelf, threads);
		await endWhereDone(rerunId);
	}
}

const AGAIN_AFTER_MS = 30_000;
let isStopping = false;
let current: Promise<void> | null = null;
let isAskedFor = false;
let timer: NodeJS.Timeout | undefined;

function tryAgainSoon(): void {
	timer = setTimeout(continueReruns, AGAIN_AFTER_MS);
	timer.unref();
}

/** One that cannot go on stands back for the others, and is tried again later. */
async function runAll(): Promise<void> {
	const threads = openRerunThreads();
	const stuck = new Set<number>();
	try {
		for (;;) {
			const begun = await Rerun.findAll({ where: { state: 'running' }, order: [['id', 'ASC']] });
			const next = begun.find(({ id }) => !stuck.has(id));
			if (!next || isStopping) break;
			await runOne(next.id, threads).catch((error: unknown) => {
				if (isStopping) return;
				logger.error({ err: error, rerunId: next.id }, 're-run could not go on, tried again soon');
				stuck.add(next.id);
			});
		}
	} finally {
		await threads.close();
	}
	if (stuck.size > 0 && !isStopping) tryAgainSoon();
}

/** Sees to it that every re-run that is not at its end is worked on, by this process alone one after the other. */
export function continueReruns(): void {
	if (isStopping) return;
	isAskedFor = true;
	current ??= outsideTransaction(work).finally(() => {
		current = null;
	});
}

async function work(): Promise<void> {
	while (isAskedFor && !isStopping) {
		isAskedFor = false;
		await runAll().catch((error: unknown) => {
			if (isStopping) return;
			logger.error({ err: error }, 're-runs failed, tried again soon');
			tryAgainSoon();
		});
	}
}

/** For a start of the application: goes on where it was left. */
export function startReruns(): void {
	isStopping = false;
	continueReruns();
}

/** Lets the batch under way be kept, and stops. */
export async function stopReruns(): Promise<void> {
	isStopping = true;
	clearTimeout(timer);
	await current;
}

/** Until nothing is left to do: for tests and programs. */
export async function finishReruns(): Promise<void> {
	startReruns();
	await current;
}
