import { QueryTypes } from 'sequelize';
import { z } from 'zod';
import {
	REVIEW_SORTS,
	type ReviewInstallation,
	type ReviewList,
	type ReviewListQuery,
	type ReviewPage,
	type ReviewScope,
	type ReviewSort
} from '$lib/schemas/review';
import type { SignedInPerson } from '$lib/schemas/people';
import { findEntrant } from '$lib/format/recommendations';
import { connection } from '../../db/connection';
import { allow } from '../../policies';
import { readCursor, writeCursor } from '../cursors';
import { daysBetween, today } from '../days';
import { predictUntil } from './predicted-days';
import { countInstallations, shownZone, storedZone } from './read-sums';
import { MILLION, readRow, sumsOf, type ReviewRow, type StoredRow } from './review-row';

/** Where a page ended: the day that the list is ordered by, and the installation that breaks ties. */
const positionSchema = z.object({ day: z.iso.date(), id: z.number().int() });
type Position = z.infer<typeof positionSchema>;

interface Order {
	column: 'fitted_on' | 'next_due_on';
	direction: 'ASC' | 'DESC';
}
const ORDERS: Record<ReviewSort, Order> = {
	newest: { column: 'fitted_on', direction: 'DESC' },
	oldest: { column: 'fitted_on', direction: 'ASC' },
	'longest-due': { column: 'next_due_on', direction: 'ASC' }
};

const LISTS: Record<ReviewList, string> = {
	overdue: 'next_due_on < :today',
	overrides: 'against_verdict = 1',
	waiting: "sheet_state = 'waiting'",
	missing: "sheet_state = 'missing'",
	'gone-dark': 'dark_days > 0'
};

export function conditionsOn(workshopId: number, scope: ReviewScope, list?: ReviewList) {
	const { kind, zone, place, verdict, since, until } = scope;
	const conditions = ['workshop_id = :workshopId'];
	if (zone !== undefined) conditions.push(`${kind === 'own' ? 'own_zone_id' : 'zone'} = :zone`);
	if (place !== undefined) conditions.push('place_id = :place');
	if (verdict !== undefined) conditions.push('verdict = :verdict');
	if (since !== undefined) conditions.push('fitted_on >= :since');
	if (until !== undefined) conditions.push('fitted_on <= LAST_DAY(:until)');
	if (list !== undefined) conditions.push(LISTS[list]);
	const replacements = {
		...{ workshopId, place, verdict, today: today() },
		zone: zone === undefined ? undefined : storedZone(kind, zone),
		since: since && `${since}-01`,
		until: until && `${until}-01`
	};
	return { where: conditions.join(' AND '), replacements };
}

/** A range on the first column, which an index can follow; the second breaks ties only. */
const beyond = ({ column, direction }: Order): string => {
	const [inclusive, strict] = direction === 'ASC' ? ['>=', '>'] : ['<=', '<'];
	return `AND ${column} ${inclusive} :day AND (${column} ${strict} :day OR installation_id ${strict} :id)`;
};

/**
 * The indexes that a page can be entered through at its beginning. Left to itself, the server takes all rows of the
 * workshop for the cheaper way and walks from the first page to the one that was asked for.
 */
const ENTRIES: Record<Order['column'], string> = {
	fitted_on: [
		...['review_rows_in_order', 'review_rows_by_zone', 'review_rows_by_own_zone', 'review_rows_by_place'],
		...['review_rows_by_verdict', 'review_rows_overridden', 'review_rows_by_sheet', 'review_rows_gone_dark'],
		'review_rows_overdue'
	].join(', '),
	next_due_on: 'review_rows_due, review_rows_overdue'
};
const enter = ({ column }: Order): string => `FORCE INDEX (${ENTRIES[column]})`;

/** Of whom each row tells is looked up for the rows of the page alone. */
const page = (where: string, order: Order, isFirst: boolean): string => `
	SELECT r.*, j.number AS jobNumber, m.letter, m.name AS mountName, c.name AS customer, v.make, v.model,
		p.name AS place, a.chemistry, n.against_verdict AS overVerdict, n.against_maker AS overMaker, n.decided_by AS decidedBy, n.reason, e.name AS enteredBy, CAST(DATE(s.created_at) AS CHAR) AS sheetSentOn,
		l.id AS laterId, l.number AS laterNumber, CAST(DATE(l.created_at) AS CHAR) AS laterOn, w.name AS laterBy
	FROM (
		SELECT * FROM review_rows ${isFirst ? '' : enter(order)} WHERE ${where}
		ORDER BY ${order.column} ${order.direction}, installation_id ${order.direction} LIMIT :limit
	) r
		JOIN installations i ON i.id = r.installation_id
		JOIN assessments a ON a.id = i.assessment_id
		JOIN mounts m ON m.id = r.mount_id
		JOIN jobs j ON j.id = r.job_id
		JOIN customers c ON c.id = j.customer_id
		JOIN vehicles v ON v.id = j.vehicle_id
		LEFT JOIN places p ON p.id = r.place_id
		LEFT JOIN recommendations n ON n.id = r.recommendation_id
		LEFT JOIN people e ON e.id = n.created_by
		LEFT JOIN sheets s ON s.id = r.sheet_id
		LEFT JOIN recommendations l ON l.id = (
			SELECT MAX(o.id) FROM recommendations o JOIN assessments b ON b.id = o.assessment_id
			WHERE o.job_id = r.job_id AND b.mount_id = r.mount_id AND o.id > r.recommendation_id)
		LEFT JOIN people w ON w.id = l.created_by
	ORDER BY r.${order.column} ${order.direction}, r.installation_id ${order.direction}
`;

/** From the day of fitting to the end of today; null where the chance is not known. */
function predictedOf(row: ReviewRow, now: string): number | null {
	if (row.chance !== 'known') return null;
	const [, , , firstMonth = 0] = sumsOf(row).sums;
	const monthDays = row.expected.map((millionths) => millionths / MILLION);
	const month = row.fittedOn.slice(0, 7);
	return predictUntil({ month, firstMonthDays: firstMonth / MILLION, monthDays }, now);
}

function present(stored: StoredRow, kind: ReviewScope['kind'], now: string): ReviewInstallation {
	const row = readRow(stored);
	const text = (name: string): string => String(stored[name] ?? '');
	const { installationId, mountId, jobId, fittedOn, verdict, chance, nextDueOn, sheetState } = row;
	const yearDays = row.expected.reduce((sum, millionths) => sum + millionths, 0) / MILLION;
	return {
		...{ installationId, mountId, jobId, fittedOn, verdict, chance, nextDueOn, sheetState },
		jobNumber: Number(stored.jobNumber),
		mount: `${text('letter')}: ${text('mountName')}`,
		customer: text('customer'),
		vehicle: `${text('make')} ${text('model')}`,
		place: stored.place === null ? null : text('place'),
		zone: shownZone(kind, kind === 'own' ? row.ownZoneId : row.zone),
		chemistry: text('chemistry'),
		expectedDaysAYear: chance === 'known' ? yearDays : null,
		predictedDays: predictedOf(row, now),
		reportedDays: row.darkDays,
		overdueDays: nextDueOn === null ? 0 : Math.max(daysBetween(nextDueOn, now), 0),
		override: row.againstVerdict
			? {
					...{ decidedBy: text('decidedBy'), reason: text('reason') },
					againstVerdict: Number(stored.overVerdict) === 1,
					againstMaker: Number(stored.overMaker) === 1,
					enteredBy: findEntrant(text('decidedBy'), text('enteredBy'))
				}
			: null,
		later:
			stored.laterId === null
				? null
				: {
						...{ id: Number(stored.laterId), number: Number(stored.laterNumber) },
						...{ on: text('laterOn'), recommendedBy: text('laterBy') }
					},
		sheetSentOn: sheetState === 'missing' || stored.sheetSentOn === null ? null : text('sheetSentOn')
	};
}

const sortOf = ({ sort, list }: ReviewListQuery): ReviewSort =>
	sort ?? (list === 'overdue' ? 'longest-due' : REVIEW_SORTS[0]);

async function readPage(workshopId: number, query: ReviewListQuery, from: Position | null, limit: number) {
	const order = ORDERS[sortOf(query)];
	const { where, replacements } = conditionsOn(workshopId, query, query.list);
	const dated = order.column === 'next_due_on' ? ' AND next_due_on IS NOT NULL' : '';
	const stored = await connection().query<StoredRow>(
		page(`${where}${dated} ${from ? beyond(order) : ''}`, order, from === null),
		{ replacements: { ...replacements, ...(from ?? {}), limit }, type: QueryTypes.SELECT }
	);
	const positionOf = (row: StoredRow): Position => ({
		day: String(row[order.column]),
		id: Number(row.installation_id)
	});
	return { stored, positionOf };
}

async function countOverdue(workshopId: number, scope: ReviewScope): Promise<number> {
	const { where, replacements } = conditionsOn(workshopId, scope, 'overdue');
	const [row] = await connection().query<{ count: number }>(
		`SELECT COUNT(*) AS count FROM review_rows WHERE ${where}`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return Number(row?.count ?? 0);
}

/** One page of the installations of a workshop, how many there are in all, and where the next page begins. */
export async function listInstallations(person: SignedInPerson, query: ReviewListQuery): Promise<ReviewPage> {
	allow(person, 'review.read');
	const { workshopId } = person;
	const { list, cursor, limit, kind } = query;
	const now = today();
	const scope = `review ${workshopId} ${sortOf(query)}`;
	const from = cursor === undefined ? null : readCursor(scope, cursor, positionSchema);
	const [{ stored, positionOf }, total] = await Promise.all([
		// One more than asked for tells whether there is a next page.
		readPage(workshopId, query, from, limit + 1),
		list === 'overdue' ? countOverdue(workshopId, query) : countInstallations(workshopId, query, list)
	]);
	const rows = stored.slice(0, limit);
	const last = rows.at(-1);
	return {
		rows: rows.map((row) => present(row, kind, now)),
		total,
		next: stored.length > limit && last ? writeCursor(scope, positionOf(last)) : null
	};
}

/** All of a list, a batch at a time, each read when the one before it has gone out. */
export async function* walkInstallations(
	person: SignedInPerson,
	query: ReviewListQuery,
	batch: number
): AsyncGenerator<ReviewInstallation[]> {
	const { workshopId } = allow(person, 'review.read');
	const now = today();
	for (let from: Position | null = null; ;) {
		const { stored, positionOf } = await readPage(workshopId, query, from, batch);
		yield stored.map((row) => present(row, query.kind, now));
		const last = stored.at(-1);
		if (!last || stored.length < batch) return;
		from = positionOf(last);
	}
}
