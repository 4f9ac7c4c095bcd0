import { QueryTypes } from 'sequelize';
import { NO_ZONE, type ReviewList, type ReviewScope } from '$lib/schemas/review';
import type { Verdict } from '$lib/schemas/verdicts';
import { connection } from '../../db/connection';
import type { Cohort } from './predicted-days';
import { MILLION, MONTH_NUMBERS } from './review-row';

/** Installations of one kind: in one zone, place or none in particular, of one verdict, fitted in one month. */
export interface SumsRow extends Cohort {
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

/** What the rows are told apart by, beside verdict and month. */
export type Grouping = 'zone' | 'place' | 'nothing';

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

const MONTH_SUMS = MONTH_NUMBERS.map((number) => `SUM(s.m${number}) AS m${number}`).join(', ');

function queryFor(grouping: Grouping, kind: ReviewScope['kind'], where: string): string {
	const group = { zone: ZONES[kind], place: 's.place_id', nothing: "''" }[grouping];
	return `
		SELECT ${group} AS grouped, s.verdict, CAST(s.fitted_month AS CHAR) AS fittedMonth,
			SUM(s.installations) AS installations, SUM(s.known) AS known, SUM(s.never_dark) AS neverDark,
			SUM(s.first_month) AS firstMonth, ${MONTH_SUMS},
			SUM(s.dark_days) AS darkDays, SUM(s.known_dark_days) AS knownDarkDays,
			SUM(s.known_not_heat_days) AS knownNotHeatDays, SUM(s.gone_dark) AS goneDark,
			SUM(s.overrides) AS overrides, SUM(s.sheets_waiting) AS sheetsWaiting,
			SUM(s.sheets_missing) AS sheetsMissing
		FROM review_months s LEFT JOIN places p ON p.id = s.place_id
		WHERE ${where}
		GROUP BY grouped, s.verdict, s.fitted_month
		HAVING installations > 0
	`;
}

type Stored = Record<string, string | number> & { verdict: Verdict; fittedMonth: string };

function readSums(stored: Stored): SumsRow {
	const number = (name: string): number => Number(stored[name]);
	return {
		group: String(stored.grouped),
		verdict: stored.verdict,
		month: stored.fittedMonth.slice(0, 7),
		firstMonthDays: number('firstMonth') / MILLION,
		monthDays: MONTH_NUMBERS.map((month) => number(`m${month}`) / MILLION),
		installations: number('installations'),
		known: number('known'),
		neverDark: number('neverDark'),
		darkDays: number('darkDays'),
		knownDarkDays: number('knownDarkDays'),
		knownNotHeatDays: number('knownNotHeatDays'),
		goneDark: number('goneDark'),
		overrides: number('overrides'),
		sheetsWaiting: number('sheetsWaiting'),
		sheetsMissing: number('sheetsMissing')
	};
}

/** The sums of a workshop within a scope. */
export async function listSums(
	workshopId: number,
	scope: ReviewScope,
	grouping: Grouping
): Promise<SumsRow[]> {
	const { where, replacements } = conditionsOf(workshopId, scope);
	const rows = await connection().query<Stored>(queryFor(grouping, scope.kind, where), {
		replacements,
		type: QueryTypes.SELECT
	});
	return rows.map(readSums);
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
