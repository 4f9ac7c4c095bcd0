import { hasBms } from '$lib/schemas/batteries';
import type { Chance, SheetState } from '$lib/schemas/review';
import type { Verdict } from '$lib/schemas/verdicts';
import { daysInMonth } from './predicted-days';

/** Sums of millionths are exact, whatever the order in which rows come and go. */
export const MILLION = 1e6;

export const MONTH_NUMBERS = Array.from({ length: 12 }, (_, month) => String(month + 1).padStart(2, '0'));
const ROW_MONTHS = MONTH_NUMBERS.map((number) => `e${number}`);
const SUM_MONTHS = MONTH_NUMBERS.map((number) => `m${number}`);

/** What is read of an installation to summarise it. */
export interface ReviewSource {
	installationId: number;
	workshopId: number;
	mountId: number;
	jobId: number;
	placeId: number;
	zone: string;
	ownZoneId: number;
	fittedOn: string;
	verdict: Verdict;
	chemistry: string;
	/** Expected dark days by month; null where the outlook has not been worked out. */
	expectedDays: readonly number[] | null;
	darkDays: readonly { on: string; isHeat: boolean }[];
	nextDueOn: string | null;
	recommendationId: number | null;
	/** Or against the word of the battery's maker: somebody answers for it by name. */
	againstVerdict: boolean;
	sheetId: number | null;
	isAcknowledged: boolean;
}

/** A row of review_rows. */
export interface ReviewRow extends Omit<
	ReviewSource,
	'chemistry' | 'expectedDays' | 'darkDays' | 'isAcknowledged'
> {
	chance: Chance;
	/** Millionths of a day in each month of a year. */
	expected: number[];
	darkDays: number;
	notHeatDays: number;
	sheetState: SheetState;
}

const chanceOf = ({ chemistry, expectedDays }: ReviewSource): Chance => {
	if (!hasBms(chemistry)) return 'never';
	return expectedDays === null ? 'unknown' : 'known';
};

const sheetStateOf = ({ isAcknowledged, sheetId }: ReviewSource): SheetState => {
	if (isAcknowledged) return 'acknowledged';
	return sheetId === null ? 'missing' : 'waiting';
};

export function summarise(source: ReviewSource): ReviewRow {
	const { chemistry: _chemistry, expectedDays, darkDays, isAcknowledged: _acknowledged, ...kept } = source;
	const chance = chanceOf(source);
	return {
		...kept,
		chance,
		expected: MONTH_NUMBERS.map((_, month) =>
			chance === 'known' ? Math.round((expectedDays?.[month] ?? 0) * MILLION) : 0
		),
		darkDays: darkDays.length,
		notHeatDays: darkDays.filter(({ isHeat }) => !isHeat).length,
		sheetState: sheetStateOf(source)
	};
}

export const ROW_COLUMNS = [
	...['installation_id', 'workshop_id', 'mount_id', 'job_id', 'place_id', 'zone', 'own_zone_id', 'fitted_on'],
	...['verdict', 'chance', ...ROW_MONTHS, 'dark_days', 'not_heat_days', 'next_due_on', 'against_verdict'],
	...['recommendation_id', 'sheet_state', 'sheet_id']
];

/** In the order of ROW_COLUMNS. */
export const rowValues = (row: ReviewRow): unknown[] => [
	...[row.installationId, row.workshopId, row.mountId, row.jobId, row.placeId, row.zone, row.ownZoneId],
	...[row.fittedOn, row.verdict, row.chance, ...row.expected, row.darkDays, row.notHeatDays, row.nextDueOn],
	...[row.againstVerdict ? 1 : 0, row.recommendationId, row.sheetState, row.sheetId]
];

export type StoredRow = Record<string, string | number | null>;

/** A row as it was read from the table. */
export function readRow(stored: StoredRow): ReviewRow {
	const number = (column: string): number => Number(stored[column]);
	const optional = (column: string): number | null => (stored[column] === null ? null : number(column));
	return {
		installationId: number('installation_id'),
		workshopId: number('workshop_id'),
		mountId: number('mount_id'),
		jobId: number('job_id'),
		placeId: number('place_id'),
		zone: String(stored.zone),
		ownZoneId: number('own_zone_id'),
		fittedOn: String(stored.fitted_on),
		verdict: stored.verdict as Verdict,
		chance: stored.chance as Chance,
		expected: ROW_MONTHS.map(number),
		darkDays: number('dark_days'),
		notHeatDays: number('not_heat_days'),
		nextDueOn: stored.next_due_on === null ? null : String(stored.next_due_on),
		againstVerdict: number('against_verdict') === 1,
		recommendationId: optional('recommendation_id'),
		sheetState: stored.sheet_state as SheetState,
		sheetId: optional('sheet_id')
	};
}

export const SUM_KEYS = ['workshop_id', 'place_id', 'verdict', 'fitted_month'];
export const SUM_COLUMNS = [
	...['installations', 'known', 'never_dark', 'first_month', ...SUM_MONTHS, 'dark_days', 'known_dark_days'],
	...['known_not_heat_days', 'gone_dark', 'overrides', 'sheets_waiting', 'sheets_missing']
];

const one = (holds: boolean): number => (holds ? 1 : 0);

/** What a row adds to the sums of its place, verdict and month, in the order of SUM_COLUMNS. */
export function sumsOf(row: ReviewRow): { key: (string | number)[]; sums: number[] } {
	const month = Number(row.fittedOn.slice(5, 7)) - 1;
	const days = daysInMonth(row.fittedOn);
	const daysLeft = days - Number(row.fittedOn.slice(8, 10)) + 1;
	const isKnown = row.chance === 'known';
	return {
		key: [row.workshopId, row.placeId, row.verdict, `${row.fittedOn.slice(0, 7)}-01`],
		sums: [
			...[1, one(isKnown), one(row.chance === 'never')],
			...[Math.round((row.expected[month]! * daysLeft) / days), ...row.expected],
			...[row.darkDays, isKnown ? row.darkDays : 0, isKnown ? row.notHeatDays : 0, one(row.darkDays > 0)],
			...[one(row.againstVerdict), one(row.sheetState === 'waiting'), one(row.sheetState === 'missing')]
		]
	};
}
