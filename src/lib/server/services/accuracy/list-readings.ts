import { QueryTypes } from 'sequelize';
import { z } from 'zod';
import { type Reading, type Readings, type ReadingsQuery } from '$lib/schemas/accuracy';
import { NO_ZONE } from '$lib/schemas/review';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../../db/connection';
import { allow } from '../../policies';
import { presentReading, type StoredReading } from '../../presenters/readings';
import { readCursor, writeCursor } from '../cursors';
import { CHECKS, ZONE } from './check-scope';

/** Where a page ended: how far off its last reading was, and its number, which breaks ties. */
const positionSchema = z.object({ misfit: z.number(), id: z.number().int() });
type Position = z.infer<typeof positionSchema>;

function conditionsOn(workshopId: number, { kind, book, zone, position, show }: ReadingsQuery) {
	const conditions = [
		'c.workshop_id = :workshopId',
		show === 'left-out' ? "c.left_out <> ''" : "c.left_out = ''"
	];
	if (kind !== undefined) conditions.push('c.kind = :kind');
	if (book !== undefined) conditions.push('b.number = :book');
	if (zone !== undefined) conditions.push(`${ZONE} = :zone`);
	if (position !== undefined) conditions.push('m.position_kind = :position');
	const replacements = { workshopId, kind, book, zone: zone === NO_ZONE ? '' : zone, position };
	return { where: conditions.join(' AND '), replacements };
}

const BEYOND = 'AND c.misfit <= :misfit AND (c.misfit < :misfit OR c.id < :id)';

const page = (where: string): string => `
	SELECT c.id, c.kind, CAST(c.read_on AS CHAR) AS readOn, m.job_id AS jobId, j.number AS jobNumber,
		c.mount_id AS mountId, m.letter, m.name, c.assessment_id AS assessmentId, b.number AS book, ${ZONE} AS zone,
		m.position_kind AS position, c.measured, c.predicted, c.low, c.high, c.error, c.deviations, c.misfit, c.stand,
		c.chance, c.observed_days AS observedDays, c.is_entered_later AS isEnteredLater, c.left_out AS leftOut,
		c.trace_id AS traceId, t.name AS traceName, c.place AS tracePlace,
		JSON_VALUE(n.data, '$.place') AS place, JSON_VALUE(n.data, '$.turnedC') AS turnedC,
		JSON_VALUE(n.data, '$.notTurnedC') AS notTurnedC
	FROM ${CHECKS}
		LEFT JOIN field_notes n ON n.id = c.field_note_id
		LEFT JOIN traces t ON t.id = c.trace_id
	WHERE ${where} ORDER BY c.misfit DESC, c.id DESC LIMIT :limit
`;

function readPage(
	workshopId: number,
	query: ReadingsQuery,
	from: Position | null,
	limit: number
): Promise<StoredReading[]> {
	const { where, replacements } = conditionsOn(workshopId, query);
	return connection().query<StoredReading>(page(`${where} ${from ? BEYOND : ''}`), {
		replacements: { ...replacements, ...from, limit },
		type: QueryTypes.SELECT
	});
}

/** What a trace was held against; null where it was not. */
export async function findTraceReading(
	{ workshopId }: SignedInPerson,
	traceId: number
): Promise<Reading | null> {
	const [stored] = await connection().query<StoredReading>(
		page('c.workshop_id = :workshopId AND c.trace_id = :traceId'),
		{ replacements: { workshopId, traceId, limit: 1 }, type: QueryTypes.SELECT }
	);
	return stored ? presentReading(stored) : null;
}

async function countReadings(workshopId: number, query: ReadingsQuery): Promise<number> {
	const { where, replacements } = conditionsOn(workshopId, query);
	const [row] = await connection().query<{ count: number }>(
		`SELECT COUNT(*) AS count FROM ${CHECKS} WHERE ${where}`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return Number(row?.count ?? 0);
}

const positionOf = ({ misfit, id }: StoredReading): Position => ({ misfit: Number(misfit), id: Number(id) });

/** One page of single readings, the furthest from its prediction first. */
export async function listReadings(person: SignedInPerson, query: ReadingsQuery): Promise<Readings> {
	const { workshopId } = allow(person, 'books.read');
	const { cursor, limit } = query;
	const scope = `readings ${workshopId}`;
	const from = cursor === undefined ? null : readCursor(scope, cursor, positionSchema);
	const [stored, total] = await Promise.all([
		// One more than asked for tells whether there is a next page.
		readPage(workshopId, query, from, limit + 1),
		countReadings(workshopId, query)
	]);
	const rows = stored.slice(0, limit);
	const last = rows.at(-1);
	return {
		readings: rows.map(presentReading),
		total,
		next: stored.length > limit && last ? writeCursor(scope, positionOf(last)) : null
	};
}

/** All of them, a batch at a time, each read when the one before it has gone out. */
export async function* walkReadings(
	person: SignedInPerson,
	query: ReadingsQuery,
	batch: number
): AsyncGenerator<Reading[]> {
	const { workshopId } = allow(person, 'books.read');
	for (let from: Position | null = null; ;) {
		const stored: StoredReading[] = await readPage(workshopId, query, from, batch);
		yield stored.map(presentReading);
		const last = stored.at(-1);
		if (!last || stored.length < batch) return;
		from = positionOf(last);
	}
}
