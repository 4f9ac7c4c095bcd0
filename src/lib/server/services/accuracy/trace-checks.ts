import { QueryTypes, type Transaction } from 'sequelize';
import type { LeftOut } from '$lib/schemas/accuracy';
import { ScenarioError } from '$lib/thermal';
import { EngineInputError } from '$lib/thermal/correlations/require';
import { holdTrace, type HeldTrace } from '$lib/thermal/fit';
import { connection } from '../../db/connection';
import { Assessment, Coefficient, Fit, Trace } from '../../db/models';
import { inTransaction } from '../../db/transaction';
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
async function hold(
	trace: Trace,
	assessment: Assessment,
	tell: (share: number) => void
): Promise<HeldTrace | null> {
	try {
		const given = await traceToFit(trace, assessment, []);
		return await workInSlices(holdTrace(given, { samples: DRAWS, seed: trace.id }), tell);
	} catch (error) {
		if (error instanceof EngineInputError || error instanceof ScenarioError) return null;
		throw error;
	}
}

/** Whoever changes one of these, its mount or what is held against it comes before this or after. */
async function lockFile({ workshopId, sha256 }: Trace, transaction: Transaction): Promise<void> {
	await connection().query(
		'SELECT id FROM traces WHERE workshop_id = :workshopId AND sha256 = :sha256 ORDER BY id FOR UPDATE',
		{ replacements: { workshopId, sha256 }, type: QueryTypes.SELECT, transaction }
	);
}

/** Whoever comes second finds the first one's, or a trace that is another by now, or was asked for anew. */
async function isAsItWas(
	{ id, version }: Trace,
	askIds: readonly number[],
	transaction: Transaction
): Promise<boolean> {
	const [row] = await connection().query<{ unheld: number }>(
		`SELECT COUNT(*) AS unheld FROM ${UNHELD_TRACES} AND t.id = :id AND t.version = :version
			AND NOT EXISTS (SELECT 1 FROM traces_to_hold a WHERE a.trace_id = t.id AND a.id NOT IN (:askIds))`,
		{ replacements: { id, version, askIds }, type: QueryTypes.SELECT, transaction }
	);
	return Number(row?.unheld) > 0;
}

async function write(
	trace: Trace,
	{ assessment, readOn, isEnteredLater }: Prediction,
	held: HeldTrace,
	transaction: Transaction
): Promise<void> {
	const leftOut = await findLeftOut(trace, assessment, transaction);
	const { id: traceId, workshopId, mountId } = trace;
	const { id: assessmentId, bookId } = assessment;
	const about = { workshopId, mountId, installationId: null, fieldNoteId: null, traceId };
	const row = { kind: 'trace', ...about, assessmentId, bookId, readOn, held, isEnteredLater } as const;
	await writeChecks([{ ...row, watched: null, leftOut }], transaction);
}

const drop = (askIds: readonly number[], transaction?: Transaction) =>
	connection().query('DELETE FROM traces_to_hold WHERE id IN (:askIds)', {
		...{ replacements: { askIds }, type: QueryTypes.DELETE },
		...(transaction ? { transaction } : {})
	});

/** What can be said of a trace, where anything can. */
async function work(trace: Trace | null, tell: (share: number) => void) {
	if (!trace || trace.state !== 'read' || startHourOf(trace) === null) return null;
	const prediction = await predictionOf(trace);
	const held = prediction && (await hold(trace, prediction.assessment, tell));
	return held && { trace, prediction, held };
}

/**
 * Holds a trace against what had been predicted of its day, and keeps that in one transaction with the end of the asking; says
 * whether it did. What had been predicted comes from the assessment of the time, run with the legs as they were driven on the
 * air as it was.
 *
 * @param askIds the rows that asked for it: one that came later asks for another trace than this
 */
export async function holdTraceAsked(
	traceId: number,
	askIds: readonly number[],
	tell: (share: number) => void = () => {}
): Promise<boolean> {
	const found = await work(await Trace.findByPk(traceId), tell);
	return inTransaction(async (transaction) => {
		if (found) await lockFile(found.trace, transaction);
		const isToBeKept = found !== null && (await isAsItWas(found.trace, askIds, transaction));
		if (isToBeKept) await write(found.trace, found.prediction, found.held, transaction);
		await drop(askIds, transaction);
		return isToBeKept;
	});
}
