import { QueryTypes } from 'sequelize';
import type { HoldsProgress, TraceHold } from '$lib/schemas/accuracy';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../../db/connection';
import { Assessment } from '../../db/models';
import { allow } from '../../policies';
import { startHourOf } from '../../presenters/traces';
import { follow } from '../follow';
import { findTrace } from '../traces';
import { UNHELD_TRACES, WAITS } from './check-scope';
import { shareHeld } from './hold-waiting';
import { findTraceReading } from './list-readings';

async function listWaiting(workshopId: number, traceId: number | null = null): Promise<number[]> {
	const rows = await connection().query<{ id: number }>(
		`SELECT t.id FROM ${UNHELD_TRACES} AND ${WAITS} AND t.workshop_id = :workshopId
			AND (:traceId IS NULL OR t.id = :traceId)`,
		{ replacements: { workshopId, traceId }, type: QueryTypes.SELECT }
	);
	return rows.map(({ id }) => id);
}

/** What a trace says beside what had been predicted of its day: null of one that was made up, or was not read. */
export async function findTraceHold(person: SignedInPerson, traceId: number): Promise<TraceHold | null> {
	allow(person, 'traces.read');
	const trace = await findTrace(person, traceId);
	if (trace.isSynthetic || trace.state !== 'read') return null;
	// Asked in this order: one that comes to its end in between is then found held.
	const [waits] = await listWaiting(person.workshopId, traceId);
	const reading = await findTraceReading(person, traceId);
	if (reading) return { state: 'held', reading };
	if (waits !== undefined) return { state: 'waits', share: shareHeld(traceId) };
	if (startHourOf(trace) === null) return { state: 'none', why: 'no-hour' };
	const assessments = await Assessment.count({ where: { mountId: trace.mountId } });
	return { state: 'none', why: assessments === 0 ? 'no-assessment' : 'no-run' };
}

/** Follows a trace until something can be said of it, or nobody listens any more. */
export const followTraceHold = (
	person: SignedInPerson,
	traceId: number,
	tell: (hold: TraceHold | null) => void,
	isOver: () => boolean
): Promise<void> =>
	follow(
		() => findTraceHold(person, traceId),
		(hold) => hold?.state !== 'waits',
		tell,
		isOver
	);

/** Tells how many traces of the workshop wait to be held until none does, or nobody listens any more. */
export async function followHolds(
	person: SignedInPerson,
	tell: (progress: HoldsProgress) => void,
	isOver: () => boolean
): Promise<void> {
	const { workshopId } = allow(person, 'books.read');
	let most = 0;
	const look = async (): Promise<HoldsProgress> => {
		const waiting = await listWaiting(workshopId);
		most = Math.max(most, waiting.length);
		const done = most - waiting.length + Math.max(0, ...waiting.map(shareHeld));
		return { waiting: waiting.length, share: most === 0 ? 1 : done / most };
	};
	await follow(look, ({ waiting }) => waiting === 0, tell, isOver);
}
