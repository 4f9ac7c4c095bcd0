import { NO_ZONE, type ReviewList, type ReviewListQuery } from '../schemas/review';
import type { Verdict } from '../schemas/verdicts';
import { sayMonth } from './dates';

/** A verdict as a clause: "what was fitted, that cut out or get too hot". */
export const VERDICT_CLAUSES: Record<Verdict, string> = {
	'cuts-out': 'that cut out or get too hot',
	'runs-close': 'that run close',
	'rides-it-out': 'that ride it out'
};

const LIST_CLAUSES: Record<ReviewList, string> = {
	overdue: 'with an overdue follow-up',
	overrides: 'that were gone ahead with against the verdict',
	waiting: 'with a sheet that nobody has acknowledged',
	missing: 'without a sheet',
	'gone-dark': 'that were reported dark'
};

/** What a page of the review is narrowed to. */
export type ReviewConditions = Pick<ReviewListQuery, 'kind'> &
	Partial<Pick<ReviewListQuery, 'zone' | 'verdict' | 'since' | 'until' | 'list'>>;

/** What the zone and the place of it are called; null where there is none. */
export interface ScopeNames {
	zoneName: string | null;
	placeName: string | null;
}
export const NO_NAMES: ScopeNames = { zoneName: null, placeName: null };

function sayFitted(since: string | undefined, until: string | undefined): string[] {
	if (since && since === until) return [`fitted in ${sayMonth(since)}`];
	if (since && until) return [`fitted from ${sayMonth(since)} to ${sayMonth(until)}`];
	if (since) return [`fitted since ${sayMonth(since)}`];
	return until ? [`fitted until ${sayMonth(until)}`] : [];
}

function sayZone({ kind, zone }: ReviewConditions, { zoneName }: ScopeNames): string[] {
	if (zone === NO_ZONE) return [kind === 'own' ? 'in none of your zones' : 'whose job has no place'];
	return zoneName ? [`of the zone ${zoneName}`] : [];
}

/** "Only installations fitted since Jan 2026, that cut out or get too hot."; null where all of them are shown. */
export function sayConditions(conditions: ReviewConditions, names: ScopeNames): string | null {
	const { verdict, since, until, list } = conditions;
	const clauses = [
		...sayFitted(since, until),
		...(verdict ? [VERDICT_CLAUSES[verdict]] : []),
		...sayZone(conditions, names),
		...(names.placeName ? [`of the place ${names.placeName}`] : []),
		...(list ? [LIST_CLAUSES[list]] : [])
	];
	return clauses.length > 0 ? `Only installations ${clauses.join(', ')}.` : null;
}
