import type { HoursAtTemperature } from './histogram';
import type { TestedRange } from './tested-range';
import { NAUMANN_CALENDAR_TESTED } from './naumann-calendar';
import { NAUMANN_CYCLE_TESTED } from './naumann-cycle';
import { SWIERCZYNSKI_TESTED } from './swierczynski-calendar';
import { WANG_TESTED } from './wang-cycle';

const MODELS: readonly (readonly [model: string, range: TestedRange])[] = [
	['Naumann 2018 calendar', NAUMANN_CALENDAR_TESTED],
	['Swierczynski 2015 calendar', SWIERCZYNSKI_TESTED],
	['Naumann 2020 cycle', NAUMANN_CYCLE_TESTED],
	['Wang 2011 cycle', WANG_TESTED]
];

/** A model used outside what its tests covered. */
export interface Extrapolation {
	model: string;
	/** Which input lies outside: `tempC`, `soc`, `depthOfDischarge`, `cRate`, `years`. */
	input: keyof TestedRange;
	/** The farthest value that was used. */
	value: number;
	tested: readonly [low: number, high: number];
	/** For temperatures, hours a year outside; else null. */
	hoursPerYear: number | null;
}

export interface UsedRange {
	year: readonly HoursAtTemperature[];
	soc: number;
	depthOfDischarge: number;
	cRate: number;
	years: number;
}

function findTemperatures(
	model: string,
	[low, high]: readonly [number, number],
	year: UsedRange['year']
): Extrapolation[] {
	const find = (
		outside: (tempC: number) => boolean,
		farthest: (...temps: number[]) => number
	): Extrapolation[] => {
		const bins = year.filter(({ tempC, hours }) => hours > 0 && outside(tempC));
		if (bins.length === 0) return [];
		const hoursPerYear = bins.reduce((sum, { hours }) => sum + hours, 0);
		const value = farthest(...bins.map(({ tempC }) => tempC));
		return [{ model, input: 'tempC', value, tested: [low, high], hoursPerYear }];
	};
	return [...find((tempC) => tempC < low, Math.min), ...find((tempC) => tempC > high, Math.max)];
}

/** Where each of the models is asked for more than its tests covered, colder and hotter apart. */
export function findExtrapolations(used: UsedRange): Extrapolation[] {
	return MODELS.flatMap(([model, range]) => {
		const single = (['soc', 'depthOfDischarge', 'cRate'] as const).flatMap((input): Extrapolation[] => {
			const tested = range[input];
			const value = used[input];
			if (tested === undefined || (value >= tested[0] && value <= tested[1])) return [];
			return [{ model, input, value, tested, hoursPerYear: null }];
		});
		const long: Extrapolation[] =
			range.years === undefined || used.years <= range.years
				? []
				: [{ model, input: 'years', value: used.years, tested: [0, range.years], hoursPerYear: null }];
		return [...findTemperatures(model, range.tempC, used.year), ...single, ...long];
	});
}
