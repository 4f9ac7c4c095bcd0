import { jeffreysInterval, sampleQuantile, scrambledSobolPoint, type Interval } from '../statistics';
import type { Scenario } from '../types';
import { countMinutes } from '../vehicle/minute-record';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { drawScenario } from './draw-scenario';
import { PRIORS } from './priors';

/** How much of the band's edges lies outside: one in twenty on each side. */
const EDGE = 0.05;
const MOST_BAND_POINTS = 150;
const CONFIDENCE = 0.9;

export interface SpreadOptions {
	/** How many days are drawn: a power of two. */
	samples: number;
	/** A whole number below 2³²; the same one gives the same digits. */
	seed: number;
}

/** The cells' temperature over the day: half of all days within the middle two, nine in ten within the outer two. */
export interface CurveBand {
	startHour: number;
	stepMin: number;
	lowC: number[];
	lowerC: number[];
	middleC: number[];
	upperC: number[];
	highC: number[];
}

/** What the estimate was after so many of the days drawn. */
export interface ConvergencePoint {
	samples: number;
	cutOutShare: number;
	middleHeadroomK: number;
}

export interface DaySpread extends SpreadOptions {
	/** How many of the days drawn end in the dark. */
	cutOuts: number;
	cutOutShare: number;
	/** Where the share lies with nine chances in ten, as far as the number of draws goes. */
	shareInterval: Interval;
	/** Days of twenty, rounded; `lessThanOne` and `nearlyAll` where rounding would say never or always. */
	daysOfTwenty: number;
	/** Headroom that one day in twenty stays below, the middle, and that one in twenty exceeds, K. */
	headroomLowK: number;
	headroomMiddleK: number;
	headroomHighK: number;
	darkHoursHigh: number;
	band: CurveBand;
	convergence: ConvergencePoint[];
	/** Fifty equally likely days, coolest first; not in what was stored before it was kept. */
	hottest?: HottestDays;
}

/** How hot it gets where the limit is watched, each day counted from the limit that was drawn with it. */
export interface HottestDays {
	limitC: number;
	daysC: number[];
}

const FEW_DAYS = 50;

/** The middles of fifty shares of equal size: what a quantile dot plot shows (Fernandes and others, CHI 2018, 144). */
function hottestDays(limitC: number, headrooms: readonly number[]): HottestDays {
	const daysC = Array.from({ length: FEW_DAYS }, (_, day) => {
		const headroomK = sampleQuantile(headrooms, 1 - (day + 0.5) / FEW_DAYS);
		return Math.round((limitC - headroomK) * 100) / 100;
	});
	return { limitC, daysC };
}

/** Whole minutes between the points of a band, so that there are not too many. */
export function bandStepMin(minuteCount: number): number {
	return Math.max(1, Math.ceil((minuteCount - 1) / MOST_BAND_POINTS));
}

function quantilesAt(rows: readonly Float64Array[], shares: readonly number[]): number[][] {
	const points = rows[0]!.length;
	const lines = shares.map(() => new Array<number>(points));
	for (let at = 0; at < points; at++) {
		const column = rows.map((row) => row[at]!).filter((value) => value === value);
		for (let k = 0; k < shares.length; k++) {
			lines[k]![at] = Math.round(sampleQuantile(column, shares[k]!) * 100) / 100;
		}
	}
	return lines;
}

const isPowerOfTwo = (count: number): boolean => (count & (count - 1)) === 0;

/**
 * How a day may really go: many draws of what is not known, each run to its end.
 *
 *     share = cut-outs / draws,  with Jeffreys' interval
 *
 * @param scenario as it was estimated
 * @param options number of draws (a power of two keeps them even) and seed
 * @returns as a generator: yields the share of the work that is done, and returns the band of the cells' temperature
 *   (quantiles 0.05, 0.25, 0.5, 0.75, 0.95), the share of days that end in the dark with its interval, the spread of the
 *   headroom, and the estimates after each power of two of draws
 * @throws RunFailedError when a draw cannot be run to its end
 * Validity: the priors of PRIORS, independent of one another; the model itself is taken for true.
 * Source: Owen, Randomly permuted (t,m,s)-nets (1995) for the points; Brown, Cai, DasGupta, Statist. Sci. 16 (2001) 101
 * for the interval.
 * @example
 * const work = spreadDay(defaultScenario([{ minutes: 60 }]), { samples: 8, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.cutOuts; // 0
 */
export function* spreadDay(
	scenario: Scenario,
	{ samples, seed }: SpreadOptions
): Generator<number, DaySpread> {
	const runner = new OutcomeRunner();
	const count = countMinutes(scenario);
	const stepMin = bandStepMin(count);
	const points = Math.floor((count - 1) / stepMin) + 1;
	const rows: Float64Array[] = [];
	const headrooms: number[] = [];
	const darkHours: number[] = [];
	const convergence: ConvergencePoint[] = [];
	let cutOuts = 0;
	for (let draw = 0; draw < samples; draw++) {
		const drawn = drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, seed));
		const cells = new Float64Array(points).fill(NaN);
		const outcome = runner.run(drawn, cells, stepMin);
		rows.push(cells);
		headrooms.push(drawn.bms.discharge.cut - outcome.peakSensorC);
		darkHours.push(outcome.darkHours);
		if (outcome.cutsOut) cutOuts++;
		const done = draw + 1;
		if (done >= 16 && isPowerOfTwo(done)) {
			convergence.push({
				samples: done,
				cutOutShare: cutOuts / done,
				middleHeadroomK: sampleQuantile(headrooms, 0.5)
			});
		}
		yield done / samples;
	}
	const [lowC, lowerC, middleC, upperC, highC] = quantilesAt(rows, [EDGE, 0.25, 0.5, 0.75, 1 - EDGE]);
	return {
		samples,
		seed,
		cutOuts,
		cutOutShare: cutOuts / samples,
		shareInterval: jeffreysInterval(cutOuts, samples, CONFIDENCE),
		daysOfTwenty: Math.round((20 * cutOuts) / samples),
		headroomLowK: sampleQuantile(headrooms, EDGE),
		headroomMiddleK: sampleQuantile(headrooms, 0.5),
		headroomHighK: sampleQuantile(headrooms, 1 - EDGE),
		darkHoursHigh: sampleQuantile(darkHours, 1 - EDGE),
		band: {
			startHour: scenario.start.hour,
			stepMin,
			lowC: lowC!,
			lowerC: lowerC!,
			middleC: middleC!,
			upperC: upperC!,
			highC: highC!
		},
		convergence,
		hottest: hottestDays(scenario.bms.discharge.cut, headrooms)
	};
}
