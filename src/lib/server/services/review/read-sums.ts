import { QueryTypes } from 'sequelize';
import { NO_ZONE, type ReviewList, type ReviewScope } from '$lib/schemas/review';
import type { Verdict } from '$lib/schemas/verdicts';
import { connection } from '../../db/connection';
import type { Cohort } from './predicted-days';
import { MILLION, MONTH_NUMBERS } from './review-row';

/** How many installations there are of a verdict, in one zone, place, month or all of them. */
export interface CountRow {
	group: string;
	verdict: Verdict;
	installations: number;
	known: number;
	neverDark: number;
	darkDays: number;
	knownDarkDays: number;
	knownNotHeatDays: number;
	goneDark: number;
	overrides: number;
	sheetsWaiting: number;
	sheetsMissing: number;
}

export interface CohortRow extends Cohort {
	group: string;
}

/** What the rows are told apart by. */
export type Grouping = 'zone' | 'place' | 'month' | 'nothing';

const ZONES = {
	climate: "COALESCE(p.computed_zone, p.climate_zone, '')",
	own: 'COALESCE(p.own_zone_id, 0)'
} as const;

/** The last day of a month is that of the month after, less one; the first of a month is enough to compare months. */
const firstOf = (month: string): string => `${month}-01`;

/** What a zone is called in the table: nothing, or number 0, where there is none. */
export const storedZone = (kind: ReviewScope['kind'], zone: string): string | number => {
	if (kind === 'own') return zone === NO_ZONE || !/^\d+$/.test(zone) ? 0 : Number(zone);
	return zone === NO_ZONE ? '' : zone;
};

export const shownZone = (kind: ReviewScope['kind'], stored: string | number): string => {
	const text = String(stored);
	return text === '' || (kind === 'own' && text === '0') ? NO_ZONE : text;
};

function conditionsOf(workshopId: number, { kind, zone, place, verdict, since, until }: ReviewScope) {
	const conditions = ['s.workshop_id = :workshopId'];
	const replacements: Record<string, unknown> = { workshopId };
	const demand = (condition: string, name: string, value: unknown): void => {
		conditions.push(condition);
		replacements[name] = value;
	};
	if (zone !== undefined) demand(`${ZONES[kind]} = :zone`, 'zone', storedZone(kind, zone));
	if (place !== undefined) demand('s.place_id = :place', 'place', place);
	if (verdict !== undefined) demand('s.verdict = :verdict', 'verdict', verdict);
	if (since !== undefined) demand('s.fitted_month >= :since', 'since', firstOf(since));
	if (until !== undefined) demand('s.fitted_month <= :until', 'until', firstOf(until));
	return { where: conditions.join(' AND '), replacements };
}

const groupOf = (grouping: Grouping, kind: ReviewScope['kind']): string =>
	({
		zone: ZONES[kind],
		place: 's.place_id',
		month: 'CAST(s.fitted_month AS CHAR)',
		nothing: "''"
	})[grouping];

const COUNTS: Record<Exclude<keyof CountRow, 'group' | 'verdict'>, string> = {
	installations: 'installations',
	known: 'known',
	neverDark: 'never_dark',
	darkDays: 'dark_days',
	knownDarkDays: 'known_dark_days',
	knownNotHeatDays: 'known_not_heat_days',
	goneDark: 'gone_dark',
	overrides: 'overrides',
	sheetsWaiting: 'sheets_waiting',
	sheetsMissing: 'sheets_missing'
};
type Count = keyof typeof COUNTS;
const COUNT_NAMES = Object.keys(COUNTS) as Count[];

/** As floating point, which takes a third of the time of decimals and holds whole numbers of this size exactly. */
const add = (column: string): string => `SUM(s.${column} * 1e0)`;
const SUMS = COUNT_NAMES.map((name) => `${add(COUNTS[name])} AS ${name}`).join(', ');
const MONTH_SUMS = MONTH_NUMBERS.map((number) => `${add(`m${number}`)} AS m${number}`).join(', ');
const FROM = 'FROM review_months s LEFT JOIN places p ON p.id = s.place_id';

type Stored = Record<string, string | number>;

/** The counts of a workshop within a scope. */
export async function listCounts(
	workshopId: number,
	scope: ReviewScope,
	grouping: Grouping
): Promise<CountRow[]> {
	const { where, replacements } = conditionsOf(workshopId, scope);
	const rows = await connection().query<Stored>(
		`SELECT ${groupOf(grouping, scope.kind)} AS grouped, s.verdict, ${SUMS}
			${FROM} WHERE ${where} GROUP BY grouped, s.verdict HAVING installations > 0`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return rows.map((row) => ({
		group: String(row.grouped),
		verdict: row.verdict as Verdict,
		...(Object.fromEntries(COUNT_NAMES.map((name) => [name, Number(row[name])])) as Record<Count, number>)
	}));
}

/** What is expected of the installations of a workshop within a scope, by the month in which they were fitted. */
export async function listCohorts(
	workshopId: number,
	scope: ReviewScope,
	grouping: Grouping
): Promise<CohortRow[]> {
	const { where, replacements } = conditionsOf(workshopId, scope);
	const rows = await connection().query<Stored>(
		`SELECT ${groupOf(grouping, scope.kind)} AS grouped, CAST(s.fitted_month AS CHAR) AS fittedMonth,
				${add('first_month')} AS firstMonth, ${MONTH_SUMS}
			${FROM} WHERE ${where} AND s.known > 0 GROUP BY grouped, s.fitted_month`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return rows.map((row) => ({
		group: String(row.grouped),
		month: String(row.fittedMonth).slice(0, 7),
		firstMonthDays: Number(row.firstMonth) / MILLION,
		monthDays: MONTH_NUMBERS.map((number) => Number(row[`m${number}`]) / MILLION)
	}));
}

/** The zones in which something has been fitted, through the few places rather than the many installations. */
export async function findZones(workshopId: number, kind: ReviewScope['kind']): Promise<string[]> {
	const rows = await connection().query<{ zone: string | number }>(
		`SELECT DISTINCT ${ZONES[kind]} AS zone
			FROM (SELECT DISTINCT place_id FROM review_months WHERE workshop_id = :workshopId AND installations > 0) s
				LEFT JOIN places p ON p.id = s.place_id`,
		{ replacements: { workshopId }, type: QueryTypes.SELECT }
	);
	return rows.map(({ zone }) => shownZone(kind, zone));
}

const COUNTED: Record<Exclude<ReviewList, 'overdue'>, string> = {
	overrides: 'overrides',
	waiting: 'sheets_waiting',
	missing: 'sheets_missing',
	'gone-dark': 'gone_dark'
};

/** How many installations a list has in all. What is overdue depends on the day, and is not among the sums. */
export async function countInstallations(
	workshopId: number,
	scope: ReviewScope,
	list: Exclude<ReviewList, 'overdue'> | undefined
): Promise<number> {
	const { where, replacements } = conditionsOf(workshopId, scope);
	const column = list ? COUNTED[list] : 'installations';
	const [row] = await connection().query<{ count: string | null }>(
		`SELECT SUM(s.${column}) AS count FROM review_months s LEFT JOIN places p ON p.id = s.place_id WHERE ${where}`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return Number(row?.count ?? 0);
}
