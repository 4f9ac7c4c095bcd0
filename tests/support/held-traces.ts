import { QueryTypes } from 'sequelize';
import { connection } from '../../src/lib/server/db/connection';
import { finishHolding } from '../../src/lib/server/services/accuracy/hold-waiting';
import { saveLegs } from '../../src/lib/server/services/trace-views';
import type { SignedInPerson } from '../../src/lib/schemas/people';
import { legsChangeSchema, type TraceView } from '../../src/lib/schemas/traces';

const select = <Row extends object>(sql: string, traceId: number): Promise<Row[]> =>
	connection().query<Row>(sql, { replacements: { traceId }, type: QueryTypes.SELECT });

/** What stands of a trace beside its prediction this moment. */
export const checksNow = (traceId: number) =>
	select<Record<string, unknown>>('SELECT * FROM prediction_checks WHERE trace_id = :traceId', traceId);

/** The same once everything that was asked for is settled. */
export async function checksOf(traceId: number) {
	await finishHolding();
	return checksNow(traceId);
}

/** The rows that ask for a trace to be held. */
export async function asksFor(traceId: number): Promise<number[]> {
	const rows = await select<{ id: number }>(
		'SELECT id FROM traces_to_hold WHERE trace_id = :traceId',
		traceId
	);
	return rows.map(({ id }) => id);
}

/** Says of the legs as they were proposed that they are right. */
export async function confirmLegs(person: SignedInPerson, { id, legs, version }: TraceView): Promise<void> {
	const sent = legs.map(({ endS, kind, meanSpeedKmh }) => ({ endS, kind, speedKmh: meanSpeedKmh }));
	await saveLegs(person, id, legsChangeSchema.parse({ legs: sent, version }));
}

/** Says that the vehicle stood all the time. */
export async function saveOneStop(person: SignedInPerson, { id, legs, version }: TraceView): Promise<void> {
	const endS = legs.at(-1)!.endS;
	const oneStop = { legs: [{ endS, kind: 'stopped', speedKmh: null }], version };
	await saveLegs(person, id, legsChangeSchema.parse(oneStop));
}
