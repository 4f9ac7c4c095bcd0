import { QueryTypes, type Transaction } from 'sequelize';
import type { LeftOut } from '$lib/schemas/accuracy';
import { ScenarioError } from '$lib/thermal';
import { EngineInputError } from '$lib/thermal/correlations/require';
import { holdTrace, type HeldTrace } from '$lib/thermal/fit';
import { connection } from '../../db/connection';
import { Assessment, Coefficient, Fit, Trace } from '../../db/models';
import { inTransaction } from '../../db/transaction';
import { logger } from '../../logger';
import { startHourOf } from '../../presenters/traces';
import { today } from '../days';
import { workInSlices } from '../slices';
import { traceToFit } from '../trace-scenario';
import { UNHELD_TRACES } from './check-scope';
import { writeChecks } from './check-rows';

const DRAWS = 64;
const MS_PER_S = 1000;

interface Prediction {
	assessment: Assessment;
	/** The day of the trace; where the logger told no date, the day it was sent in. */
	readOn: string;
	isEnteredLater: boolean;
}

/** By the calendar of the trace's place, where its logger told a date. */
function dayOf({ span, createdAt }: Trace): string {
	if (span?.timeBase !== 'utc') return today(createdAt);
	const place = new Intl.DateTimeFormat('sv-SE', { timeZone: span.timeZone ?? 'UTC' });
	return place.format(new Date(span.startS * MS_PER_S));
}

/**
 * The newest assessment that was there by the day of a trace. Where none was, the newest before the trace was sent in stands in;
 * where the mount was assessed only afterwards, the first.
 */
async function predictionOf(trace: Trace): Promise<Prediction | null> {
	const { mountId, createdAt: sentAt } = trace;
	const attributes = ['id', 'createdAt'];
	const all = await Assessment.findAll({ where: { mountId }, attributes, order: [['id', 'DESC']] });
	const readOn = dayOf(trace);
	const before = all.filter(({ createdAt }) => createdAt < sentAt);
	const found = before.find(({ createdAt }) => today(createdAt) <= readOn) ?? before[0] ?? all.at(-1);
	if (!found) return null;
	const assessment = (await Assessment.findByPk(found.id))!;
	return { assessment, readOn, isEnteredLater: today(found.createdAt) > readOn };
}

/** The fits that the values of a book came from, and those behind the books that these began from. */
async function fitsBehind(bookId: number): Promise<Fit[]> {
	const bookIds = new Set([bookId]);
	const fits = new Map<number, Fit>();
	// A set is walked to its end, also over what is added on the way.
	for (const each of bookIds) {
		const fitted = await Coefficient.findAll({ where: { bookId: each }, attributes: ['fitId'] });
		const ids = new Set(fitted.flatMap(({ fitId }) => fitId ?? []));
		const found = await Fit.findAll({ where: { id: [...ids] }, attributes: ['id', 'bookId', 'inputs'] });
		for (const fit of found) {
			fits.set(fit.id, fit);
			bookIds.add(fit.bookId);
		}
	}
	return [...fits.values()];
}

/** Whether a book has values that were learnt from this very file, sent in before: then nothing was predicted of it. */
async function isFittedTo({ bookId }: Assessment, { sha256 }: Trace): Promise<boolean> {
	const fits = await fitsBehind(bookId);
	return fits.some(({ inputs }) => inputs.traces.some((each) => each.sha256 === sha256));
}

/** Other traces of the same file that count, at mounts that stand. */
const COUNTED_ALREADY = `
	SELECT COUNT(*) AS count FROM prediction_checks c
		JOIN traces t ON t.id = c.trace_id
		JOIN mounts m ON m.id = t.mount_id AND m.removed_at IS NULL
	WHERE t.workshop_id = :workshopId AND t.sha256 = :sha256 AND t.id <> :id AND c.left_out = ''
`;

/** Why a trace does not count; empty where it does. */
async function findLeftOut(
	trace: Trace,
	assessment: Assessment,
	transaction: Transaction
): Promise<LeftOut | ''> {
	const { id, workshopId, sha256, span, legsBy } = trace;
	if (await isFittedTo(assessment, trace)) return 'fitted-to';
	if (span?.timeBase !== 'utc') return 'no-date';
	if (!span.channels.includes('ambientC')) return 'no-air';
	if ((legsBy ?? null) === null) return 'legs-open';
	const [row] = await connection().query<{ count: number }>(COUNTED_ALREADY, {
		replacements: { id, workshopId, sha256 },
		type: QueryTypes.SELECT,
		transaction
	});
	return Number(row?.count) > 0 ? 'sent-again' : '';
}

/** Null of what no prediction can be held against: nothing of the battery was measured, or its day cannot be run. */
async function hold(trace: Trace, assessment: Assessment): Promise<HeldTrace | null> {
	try {
		const given = await traceToFit(trace, assessment, []);
		return await workInSlices(holdTrace(given, { samples: DRAWS, seed: trace.id }));
	} catch (error) {
		if (error instanceof EngineInputError || error instanceof ScenarioError) return null;
		throw error;
	}
}

/** Whoever comes second finds the first one's, or a trace that is another by now. */
async function isAsItWas({ id, version }: Trace, transaction: Transaction): Promise<boolean> {
	const now = await Trace.findByPk(id, { transaction, lock: transaction.LOCK.UPDATE });
	if (now?.version !== version || (now.removedAt ?? null) !== null) return false;
	const [row] = await connection().query<{ held: number }>(
		'SELECT COUNT(*) AS held FROM prediction_checks WHERE trace_id = :id',
		{ replacements: { id }, type: QueryTypes.SELECT, transaction }
	);
	return Number(row?.held) === 0;
}

async function holdOne(id: number): Promise<boolean> {
	const trace = await Trace.findByPk(id);
	if (!trace || startHourOf(trace) === null) return false;
	const prediction = await predictionOf(trace);
	const held = prediction && (await hold(trace, prediction.assessment));
	if (!held) return false;
	const { assessment, readOn, isEnteredLater } = prediction;
	const { workshopId, mountId } = trace;
	const { id: assessmentId, bookId } = assessment;
	const about = { workshopId, mountId, installationId: null, fieldNoteId: null, traceId: id };
	return inTransaction(async (transaction) => {
		if (!(await isAsItWas(trace, transaction))) return false;
		const leftOut = await findLeftOut(trace, assessment, transaction);
		const row = { kind: 'trace', ...about, assessmentId, bookId, readOn, held, isEnteredLater } as const;
		await writeChecks([{ ...row, watched: null, leftOut }], transaction);
		return true;
	});
}

/**
 * Holds traces that wait for it against what had been predicted of their days: those of a mount, of a file, one, or all.
 * What had been predicted comes from the assessment of the time, run with the legs as they were driven on the air as it was.
 */
export async function holdTraces(
	of: { mountId?: number; traceId?: number; sha256?: string } = {}
): Promise<number> {
	const { mountId, traceId, sha256 } = of;
	const narrowed = [
		...(mountId === undefined ? [] : ['AND t.mount_id = :mountId']),
		...(traceId === undefined ? [] : ['AND t.id = :traceId']),
		...(sha256 === undefined ? [] : ['AND t.sha256 = :sha256'])
	];
	const rows = await connection().query<{ id: number }>(
		`SELECT t.id FROM ${UNHELD_TRACES} ${narrowed.join(' ')} ORDER BY t.id`,
		{
			replacements: { mountId, traceId, sha256 },
			type: QueryTypes.SELECT
		}
	);
	let count = 0;
	for (const { id } of rows) {
		try {
			if (await holdOne(Number(id))) count++;
		} catch (error) {
			// What somebody asked for is done; this waits, and is tried again at the next start.
			logger.error({ err: error, traceId: id }, 'a trace could not be held against its prediction');
		}
	}
	return count;
}

/** Of a file everywhere it was sent in, for which of its traces counts depends on the others. */
const FORGET = `
	DELETE c FROM prediction_checks c
		JOIN traces t ON t.id = c.trace_id
		JOIN traces s ON s.sha256 = t.sha256 AND s.workshop_id = t.workshop_id
`;

async function forget(where: string, id: number, transaction: Transaction): Promise<void> {
	const options = { replacements: { id }, type: QueryTypes.DELETE, transaction };
	await connection().query(`${FORGET} WHERE ${where}`, options);
}

/** Forgets what a file was held against, inside the transaction that changed a trace of it. */
export const forgetTraceCheck = (traceId: number, transaction: Transaction): Promise<void> =>
	forget('s.id = :id', traceId, transaction);

/** The same of every file of a mount that goes or comes back. */
export const forgetTraceChecksOf = (mountId: number, transaction: Transaction): Promise<void> =>
	forget('s.mount_id = :id', mountId, transaction);

/** Holds anew, wherever they were sent in, the files of a mount that went or came back. */
export async function holdTracesOf(mountId: number): Promise<void> {
	const traces = await Trace.findAll({ where: { mountId }, attributes: ['sha256'] });
	for (const sha256 of new Set(traces.map((trace) => trace.sha256))) await holdTraces({ sha256 });
}
