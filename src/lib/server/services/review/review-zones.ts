import { QueryTypes } from 'sequelize';
import { formatClimateZone } from '$lib/format/climate-zones';
import type { SignedInPerson } from '$lib/schemas/people';
import {
	NO_ZONE,
	type ReviewFigures,
	type ReviewFilter,
	type ReviewScope,
	type ReviewZone,
	type ReviewZones
} from '$lib/schemas/review';
import type { Verdict } from '$lib/schemas/verdicts';
import { poissonRatioInterval } from '$lib/thermal/statistics';
import { connection } from '../../db/connection';
import { OwnZone } from '../../db/models';
import { allow } from '../../policies';
import { today } from '../days';
import { predictUntil } from './predicted-days';
import { findZones, listCohorts, listCounts, shownZone, type CohortRow, type CountRow } from './read-sums';
import { conditionsOn } from './review-list';

const CONFIDENCE = 0.95;
/** Below this no ratio is formed: a thousandth of a day predicted is nothing to hold a report against. */
const LEAST_PREDICTED_DAYS = 1e-3;

function ratioOf(reported: number, predicted: number): ReviewFigures['ratio'] {
	if (predicted < LEAST_PREDICTED_DAYS) return null;
	return { value: reported / predicted, ...poissonRatioInterval(reported, predicted, CONFIDENCE) };
}

export function countVerdicts(rows: readonly CountRow[]): Record<Verdict, number> {
	const counts: Record<Verdict, number> = { 'rides-it-out': 0, 'runs-close': 0, 'cuts-out': 0 };
	for (const { verdict, installations } of rows) counts[verdict] += installations;
	return counts;
}

/** The figures of some counts and what was expected of them, up to the end of today. */
export function figuresOf(
	rows: readonly CountRow[],
	cohorts: readonly CohortRow[],
	overdue: number,
	now: string
): ReviewFigures {
	const sum = (read: (row: CountRow) => number): number => rows.reduce((total, row) => total + read(row), 0);
	const installations = sum((row) => row.installations);
	const known = sum((row) => row.known);
	const never = sum((row) => row.neverDark);
	const predictedDays = cohorts.reduce((total, cohort) => total + predictUntil(cohort, now), 0);
	const reportedDays = sum((row) => row.knownDarkDays);
	return {
		installations,
		verdicts: countVerdicts(rows),
		chance: { known, unknown: installations - known - never, never },
		predictedDays,
		reportedDays,
		notHeatDays: sum((row) => row.knownNotHeatDays),
		reportedElsewhere: sum((row) => row.darkDays) - reportedDays,
		ratio: ratioOf(reportedDays, predictedDays),
		overdue,
		overrides: sum((row) => row.overrides),
		sheetsWaiting: sum((row) => row.sheetsWaiting),
		sheetsMissing: sum((row) => row.sheetsMissing)
	};
}

/** Installations with a follow-up past its date, by zone. */
async function countOverdue(workshopId: number, scope: ReviewScope): Promise<Map<string, number>> {
	const column = scope.kind === 'own' ? 'own_zone_id' : 'zone';
	const { where, replacements } = conditionsOn(workshopId, scope, 'overdue');
	const rows = await connection().query<{ zone: string | number; count: number }>(
		`SELECT ${column} AS zone, COUNT(*) AS count FROM review_rows FORCE INDEX (review_rows_overdue)
			WHERE ${where} GROUP BY ${column}`,
		{ replacements, type: QueryTypes.SELECT }
	);
	return new Map(rows.map(({ zone, count }) => [shownZone(scope.kind, zone), Number(count)]));
}

export const NO_ZONE_NAMES = {
	climate: 'No place was given',
	own: 'In none of your zones'
} as const;

/** What each zone is called; own zones in their order, climate classes by letter, what is in none last. */
export async function nameZones(workshopId: number, kind: ReviewScope['kind']) {
	if (kind === 'climate') {
		const nameOf = (zone: string): string =>
			zone === NO_ZONE ? NO_ZONE_NAMES.climate : formatClimateZone(zone);
		const rankOf = (zone: string): string => (zone === NO_ZONE ? '~' : zone);
		return { nameOf, compare: (a: string, b: string) => (rankOf(a) < rankOf(b) ? -1 : 1) };
	}
	const zones = await OwnZone.findAll({
		where: { workshopId },
		order: [
			['position', 'ASC'],
			['id', 'ASC']
		]
	});
	const place = new Map(zones.map(({ id }, at) => [String(id), at]));
	const names = new Map(zones.map(({ id, name }) => [String(id), name]));
	const rankOf = (zone: string): number => place.get(zone) ?? zones.length;
	return {
		nameOf: (zone: string): string => names.get(zone) ?? NO_ZONE_NAMES.own,
		compare: (a: string, b: string) => rankOf(a) - rankOf(b)
	};
}

/** The review of a workshop, zone by zone and in all. */
export async function reviewZones(
	person: SignedInPerson,
	filter: ReviewFilter & Pick<ReviewScope, 'zone'>
): Promise<ReviewZones> {
	allow(person, 'review.read');
	const { workshopId } = person;
	const { kind } = filter;
	const now = today();
	const [counts, cohorts, overdue, { nameOf, compare }] = await Promise.all([
		listCounts(workshopId, filter, 'zone'),
		listCohorts(workshopId, filter, 'zone'),
		countOverdue(workshopId, filter),
		nameZones(workshopId, kind)
	]);
	const zones = [...new Set(counts.map(({ group }) => group))].map((group): ReviewZone => {
		const isOf = (row: { group: string }): boolean => row.group === group;
		const zone = shownZone(kind, group);
		const figures = figuresOf(counts.filter(isOf), cohorts.filter(isOf), overdue.get(zone) ?? 0, now);
		return { zone, name: nameOf(zone), ...figures };
	});
	const allOverdue = [...overdue.values()].reduce((total, count) => total + count, 0);
	return {
		on: now,
		rows: zones.sort((a, b) => compare(a.zone, b.zone)),
		all: figuresOf(counts, cohorts, allOverdue, now)
	};
}

/** The zones that a list can be narrowed to, and the day up to which is counted. */
export async function listZones(
	person: SignedInPerson,
	kind: ReviewScope['kind']
): Promise<{ on: string; zones: { value: string; label: string }[] }> {
	allow(person, 'review.read');
	const { workshopId } = person;
	const [zones, { nameOf, compare }] = await Promise.all([
		findZones(workshopId, kind),
		nameZones(workshopId, kind)
	]);
	return {
		on: today(),
		zones: zones.sort(compare).map((value) => ({ value, label: nameOf(value) }))
	};
}
