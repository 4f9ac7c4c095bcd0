import type { SignedInPerson } from '$lib/schemas/people';
import type { TraceSpan, TraceView } from '$lib/schemas/traces';
import {
	channelsOf,
	encodeTrace,
	endOf,
	measureLegs,
	proposeLegs,
	TraceError,
	type BinnedTrace,
	type TraceLeg,
	type TraceReading
} from '$lib/thermal/traces';
import { Trace } from '../db/models';
import { inTransaction, outsideTransaction } from '../db/transaction';
import { allow } from '../policies';
import { storage } from '../storage';
import { record } from './audit';
import { sayTraceError } from './describe-file';
import { readTracePieces } from './read-pieces';
import { afterOthers } from './slices';
import { askToHold } from './accuracy/ask-to-hold';
import { binsKeyOf, rawKeyOf } from './trace-bins';
import { findTrace, showTrace } from './traces';

interface Running {
	done: Promise<void>;
	/** Of the file, from 0 to 1. */
	share: number;
	listeners: Set<(share: number) => void>;
}

/** What is being read now, by trace. */
const running = new Map<number, Running>();

const GONE = 'The file is not here any more: send it again.';

const spanOf = (trace: BinnedTrace): TraceSpan => ({
	...{ timeBase: trace.timeBase, timeZone: trace.timeZone, startS: trace.startS, endS: endOf(trace) },
	...{ stepS: trace.stepS, channels: channelsOf(trace) }
});

/** Writes down how it ended, unless the trace was taken away or begun anew meanwhile. */
async function settle(
	{ id, version }: Trace,
	action: 'trace.read' | 'trace.not-read',
	changes: Parameters<Trace['update']>[0],
	detail: Record<string, unknown>
): Promise<void> {
	await inTransaction(async (transaction) => {
		const trace = await Trace.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
		if (trace?.state !== 'reading') return;
		await trace.update(changes, { transaction });
		if (action === 'trace.read') await askToHold('file', id, transaction);
		const { workshopId, mappedBy: personId } = trace;
		const entry = { workshopId, personId: personId ?? null, action, subjectType: 'trace', subjectId: id };
		await record({ ...entry, detail: { ...detail, readWith: version } }, transaction);
	});
}

/** The bins first, then the row that speaks of them; the file as it came goes last. */
async function keepReading(
	trace: Trace,
	{ trace: binned, report }: TraceReading,
	legs: TraceLeg[]
): Promise<void> {
	const { contentId } = trace;
	await storage().put(binsKeyOf(contentId), new Uint8Array(encodeTrace(binned)));
	const changes = { state: 'read', report, span: spanOf(binned), legs, readAt: new Date() } as const;
	const { kept, dropped } = report.rows;
	await settle(trace, 'trace.read', changes, { rows: kept, dropped });
	await storage().remove(rawKeyOf(contentId));
}

async function read(trace: Trace, tell: (share: number) => void): Promise<void> {
	const { contentId, mapping, proposal, bytes } = trace;
	const pieces = await storage().readPieces(rawKeyOf(contentId));
	if (!pieces) {
		const failure = { message: GONE, line: null, column: null };
		return settle(trace, 'trace.not-read', { state: 'failed', failure }, failure);
	}
	try {
		const reading = await readTracePieces(pieces, mapping, {
			firstRowLine: proposal.firstRowLine,
			tell: (read) => tell(read / bytes)
		});
		const legs = measureLegs(reading.trace, proposeLegs(reading.trace));
		await keepReading(trace, reading, legs);
	} catch (error) {
		if (!(error instanceof TraceError)) throw error;
		const failure = { message: sayTraceError(error), line: error.line, column: error.column };
		await settle(trace, 'trace.not-read', { state: 'failed', failure }, failure);
	}
}

function begin(trace: Trace): Running {
	const work: Running = { done: Promise.resolve(), share: 0, listeners: new Set() };
	const tell = (share: number): void => {
		work.share = share;
		for (const listener of work.listeners) listener(share);
	};
	work.done = outsideTransaction(() => afterOthers(() => read(trace, tell))).finally(() =>
		running.delete(trace.id)
	);
	running.set(trace.id, work);
	return work;
}

/** Reads a trace that waits for it where the caller is, in the caller's transaction. */
export async function readAtOnce(person: SignedInPerson, traceId: number): Promise<void> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	if (trace.state === 'reading') await read(trace, () => {});
}

/** Begins the reading of a trace that waits for it, and does not wait for its end. */
export async function beginReading(
	person: SignedInPerson,
	traceId: number,
	sayTrouble: (error: unknown) => void
): Promise<TraceView> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	if (trace.state === 'reading' && !running.has(traceId)) begin(trace).done.catch(sayTrouble);
	return showTrace(trace);
}

/** Follows the reading of a trace to its end; one that was broken off with the application begins again. */
export async function followReading(
	person: SignedInPerson,
	traceId: number,
	tell: (share: number) => void = () => {}
): Promise<void> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	if (trace.state !== 'reading') return;
	const work = running.get(traceId) ?? begin(trace);
	tell(work.share);
	work.listeners.add(tell);
	try {
		await work.done;
	} finally {
		work.listeners.delete(tell);
	}
}
