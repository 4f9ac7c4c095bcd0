import { QueryTypes } from 'sequelize';
import { connection } from '../../db/connection';
import { outsideTransaction } from '../../db/transaction';
import { logger } from '../../logger';
import { afterOthers } from '../slices';
import { holdTraceAsked } from './trace-checks';

const AGAIN_AFTER_MS = 30_000;

class Stopped extends Error {}

let isOpen = false;
let isAskedFor = false;
let current: Promise<number> | null = null;
/** What is under way this moment, where it is not waiting for other long work. */
let atWork: Promise<unknown> = Promise.resolve();
let timer: NodeJS.Timeout | undefined;
/** How far the trace is that is being held now, 0 to 1. */
let underWay: { traceId: number; share: number } | null = null;

/** How far a trace is in being held: 0 where it waits for others, or another process has it. */
export const shareHeld = (traceId: number): number => (underWay?.traceId === traceId ? underWay.share : 0);

interface Waiting {
	traceId: number;
	/** The rows that ask for it. */
	askIds: number[];
}

const NEXT = `
	SELECT id, trace_id AS traceId FROM traces_to_hold WHERE trace_id = (
		SELECT trace_id FROM traces_to_hold WHERE trace_id NOT IN (:passedOver) ORDER BY id LIMIT 1)
`;

/** The one that has waited longest, of those that are not passed over. */
async function nextWaiting(passedOver: ReadonlySet<number>): Promise<Waiting | null> {
	const asks = await connection().query<{ id: number; traceId: number }>(NEXT, {
		replacements: { passedOver: [0, ...passedOver] },
		type: QueryTypes.SELECT
	});
	const [first] = asks;
	return first ? { traceId: first.traceId, askIds: asks.map(({ id }) => id) } : null;
}

async function holdOne({ traceId, askIds }: Waiting): Promise<boolean> {
	const tell = (share: number): void => {
		if (!isOpen) throw new Stopped();
		underWay = { traceId, share };
	};
	const work = afterOthers(() => {
		tell(0);
		const holding = holdTraceAsked(traceId, askIds, tell);
		atWork = holding.catch(() => undefined);
		return holding;
	});
	return work.finally(() => {
		underWay = null;
	});
}

/** Everything that waits, one trace after the other; says how many were held. What could not be done stays for later. */
async function passThrough(): Promise<number> {
	const stuck = new Set<number>();
	let count = 0;
	for (;;) {
		const next = isOpen ? await nextWaiting(stuck) : null;
		if (!next) break;
		try {
			if (await holdOne(next)) count++;
		} catch (error) {
			if (error instanceof Stopped) break;
			stuck.add(next.traceId);
			logger.error(
				{ err: error, traceId: next.traceId },
				'a trace could not be held against its prediction, tried again soon'
			);
		}
	}
	if (stuck.size > 0) tryAgainSoon();
	return count;
}

function tryAgainSoon(): void {
	clearTimeout(timer);
	timer = setTimeout(continueHolding, AGAIN_AFTER_MS);
	timer.unref();
}

async function work(): Promise<number> {
	let count = 0;
	while (isAskedFor && isOpen) {
		isAskedFor = false;
		count += await passThrough().catch((error: unknown) => {
			if (!isOpen) return 0;
			logger.error({ err: error }, 'traces could not be held against their predictions, tried again soon');
			tryAgainSoon();
			return 0;
		});
	}
	return count;
}

/** Sees to it that every trace that was asked for is held: by the application, while it is up. */
export function continueHolding(): void {
	if (!isOpen) return;
	isAskedFor = true;
	current ??= outsideTransaction(work).finally(() => {
		current = null;
	});
}

/** For a start of the application: goes on where it was left. */
export function startHolding(): void {
	isOpen = true;
	continueHolding();
}

/** Breaks off what is under way, which begins again at the next start. */
export async function stopHolding(): Promise<void> {
	isOpen = false;
	clearTimeout(timer);
	await atWork;
}

/** Until nothing waits any more that can be held, and how many were. Where nobody has started it, it stops again after. */
export async function finishHolding(): Promise<number> {
	const wasOpen = isOpen;
	startHolding();
	const count = (await current) ?? 0;
	if (!wasOpen) await stopHolding();
	return count;
}
