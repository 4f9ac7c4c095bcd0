import { hashWords } from '$lib/thermal/statistics';
import { daysInMonth, listMonths, monthOf, predictInMonth } from './predicted-days';

/** What each part of an installation draws from; one number never serves two of them. */
const DRAWS = {
	...{ place: 1, fitted: 2, verdict: 3, chemistry: 4, outlook: 5, days: 6, reports: 7, looked: 8, sheet: 9 },
	...{ acknowledged: 10, removed: 11, darkOn: 12, cause: 13, latitude: 14, longitude: 15 }
} as const;
export type DrawName = keyof typeof DRAWS;

/** Within 0 to below 1. */
export const draw = (seed: number, index: number, what: DrawName, again = 0): number =>
	hashWords(seed, index, DRAWS[what], again) / 2 ** 32;

const HEAT_SHARE = 0.85;
/** The share that the coldest month has of what the hottest has. */
const COLDEST_SHARE = 0.02;

/** Twelve months of dark days: most of them in the warm half of the year. */
export function spreadOverYear(yearDays: number, isSouth: boolean): number[] {
	const weights = Array.from({ length: 12 }, (_, month) => {
		const warmth = (1 + Math.cos((2 * Math.PI * (month - (isSouth ? 0 : 6))) / 12)) / 2;
		return COLDEST_SHARE + (1 - COLDEST_SHARE) * warmth ** 2;
	});
	const sum = weights.reduce((total, weight) => total + weight, 0);
	return weights.map((weight) => (yearDays * weight) / sum);
}

export interface DarkDay {
	on: string;
	isHeat: boolean;
}

interface Exposed {
	seed: number;
	index: number;
	fittedOn: string;
	today: string;
	/** What is predicted of a whole January, …, December. */
	monthDays: readonly number[];
}

/** The days of a month from the one of fitting to the one of today. */
function daysWithin(month: string, fittedOn: string, today: string): { from: number; days: number } {
	const from = month === monthOf(fittedOn) ? Number(fittedOn.slice(8, 10)) : 1;
	const to = month === monthOf(today) ? Number(today.slice(8, 10)) : daysInMonth(`${month}-01`);
	return { from, days: to - from + 1 };
}

/**
 * Days reported dark, as many in each month as the review predicts of it in expectation: the whole part of what is
 * predicted, and one more with the chance that is left over. No day comes twice.
 */
export function inventDarkDays({ seed, index, fittedOn, today, monthDays }: Exposed): DarkDay[] {
	const first = monthOf(fittedOn);
	const { days: firstDays } = daysWithin(first, fittedOn, fittedOn.slice(0, 8) + daysInMonth(fittedOn));
	const firstMonthDays = (monthDays[Number(first.slice(5)) - 1]! * firstDays) / daysInMonth(fittedOn);
	const cohort = { month: first, firstMonthDays, monthDays };
	return listMonths(first, monthOf(today)).flatMap((month, at) => {
		const { from, days } = daysWithin(month, fittedOn, today);
		const count = Math.min(
			Math.floor(predictInMonth(cohort, month, today) + draw(seed, index, 'reports', at)),
			days
		);
		const start = Math.floor(draw(seed, index, 'darkOn', at) * days);
		return Array.from({ length: count }, (_, again): DarkDay => {
			const day = from + ((start + again * Math.floor(days / count)) % days);
			return {
				on: `${month}-${String(day).padStart(2, '0')}`,
				isHeat: draw(seed, index, 'cause', at * daysInMonth(fittedOn) + again) < HEAT_SHARE
			};
		});
	});
}
