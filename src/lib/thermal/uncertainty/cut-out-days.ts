import { normalCdf, sampleQuantile, scrambledSobolPoint } from '../statistics';
import { requireNotBelow, requirePositive } from '../correlations/require';
import type { Scenario } from '../types';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { drawScenario } from './draw-scenario';
import { findHottestDay } from './hottest-day';
import { PRIORS } from './priors';

/** Daily maxima of one month at a place: mean and standard deviation from day to day. */
export interface ClimateMonth {
	meanMaxC: number;
	spreadK: number;
}

export interface TouringYear {
	/** January to December. */
	months: readonly ClimateMonth[];
	/** Days on the road in each month. */
	daysOnRoad: readonly number[];
}

/** An expected number of days with the range in which it lies with four chances in five. */
export interface DayCount {
	low: number;
	middle: number;
	high: number;
}

export interface CutOutDays {
	samples: number;
	seed: number;
	year: DayCount;
	months: DayCount[];
	/** Days a year of ten equally likely vehicles, fewest first, with the same mean; not in what was stored before it was kept. */
	tenths?: number[];
}

export interface CutOutDaysOptions {
	samples: number;
	seed: number;
	/** The point of each draw, one coordinate a prior in the order of PRIORS; without it the seed gives them. */
	pointOf?: (draw: number) => readonly number[];
}

/** The weather is in the months: what is drawn is the vehicle and the mount. */
const OF_THE_MONTHS = 'dayMax';
const DRAWN = PRIORS.filter(({ key }) => key !== OF_THE_MONTHS);
const LIMIT_WITHIN_K = 0.5;
const OUTER = 0.1;

function requireYear({ months, daysOnRoad }: TouringYear): void {
	if (months.length !== 12 || daysOnRoad.length !== 12) {
		throw new RangeError('A year has twelve months of daily maxima and of days on the road.');
	}
	months.forEach(({ meanMaxC, spreadK }, month) => {
		requireNotBelow(-60, { [`months[${month}].meanMaxC`]: meanMaxC });
		requirePositive({ [`months[${month}].spreadK`]: spreadK });
		requireNotBelow(0, { [`daysOnRoad[${month}]`]: daysOnRoad[month]! });
	});
}

function countDays(values: readonly number[]): DayCount {
	return {
		low: sampleQuantile(values, OUTER),
		middle: values.reduce((sum, value) => sum + value, 0) / values.length,
		high: sampleQuantile(values, 1 - OUTER)
	};
}

const TENTHS = 10;

/** The mean of each tenth of the draws, where a draw may lie partly in one and partly in the next. */
function tenthsOf(values: readonly number[]): number[] {
	const sorted = [...values].sort((a, b) => a - b);
	const size = sorted.length / TENTHS;
	return Array.from({ length: TENTHS }, (_, tenth) => {
		const [from, to] = [tenth * size, (tenth + 1) * size];
		let sum = 0;
		for (let at = Math.floor(from); at < Math.min(Math.ceil(to), sorted.length); at++) {
			sum += sorted[at]! * (Math.min(at + 1, to) - Math.max(at, from));
		}
		return sum / size;
	});
}

/**
 * On how many days a year the battery goes dark, with the same plan for each day on the road.
 *
 *     days(month) = daysOnRoad · [1 − Φ((T* − mean)/spread)],   T*: hottest day that a drawn vehicle bears without going dark
 *
 * @param scenario the day as it was estimated
 * @param year mean and spread of the daily maxima in °C and K, days on the road, month by month
 * @param options number of draws and seed, or the points themselves
 * @returns as a generator, yields the share of the work done; the expected days by month and in the year: the mean over
 *   the draws, and what a tenth of them stay below and exceed; the means of the year's ten tenths
 * @throws RangeError when there are not twelve months, EngineInputError for a month that cannot be
 * Validity: daily maxima about normal within a month; sun and daily range as on the hot day; a hotter day no better.
 * Source: total probability over day and vehicle; Wilks, Statistical Methods in the Atmospheric Sciences, ch. 4, for the
 * normal law of temperatures (remembered, not read).
 * @example
 * const year = { months: Array(12).fill({ meanMaxC: 15, spreadK: 3 }), daysOnRoad: Array(12).fill(4) };
 * const work = countCutOutDays(defaultScenario([{ minutes: 60 }]), year, { samples: 2, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.year.high; // 0
 */
export function* countCutOutDays(
	scenario: Scenario,
	year: TouringYear,
	{ samples, seed, pointOf }: CutOutDaysOptions
): Generator<number, CutOutDays> {
	requireYear(year);
	const runner = new OutcomeRunner();
	const byMonth: number[][] = year.months.map(() => []);
	const sums: number[] = [];
	for (let draw = 0; draw < samples; draw++) {
		const point = pointOf
			? pointOf(draw).filter((_, at) => PRIORS[at]!.key !== OF_THE_MONTHS)
			: scrambledSobolPoint(draw, DRAWN.length, seed);
		const drawn = drawScenario(scenario, point, DRAWN);
		const limitC = findHottestDay(drawn, runner, ({ cutsOut }) => !cutsOut, LIMIT_WITHIN_K);
		let sum = 0;
		year.months.forEach(({ meanMaxC, spreadK }, month) => {
			const share = 1 - normalCdf((limitC - meanMaxC) / spreadK);
			const days = year.daysOnRoad[month]! * share;
			byMonth[month]!.push(days);
			sum += days;
		});
		sums.push(sum);
		yield (draw + 1) / samples;
	}
	return { samples, seed, year: countDays(sums), months: byMonth.map(countDays), tenths: tenthsOf(sums) };
}
