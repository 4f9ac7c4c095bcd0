import { normalQuantile, scrambledSobolPoint } from '../statistics';
import type { Scenario } from '../types';
import { countCutOutDays, type CutOutDays, type TouringYear } from '../uncertainty/cut-out-days';
import { drawScenario } from '../uncertainty/draw-scenario';
import { partOf } from '../uncertainty/finish-work';
import { PRIORS } from '../uncertainty/priors';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { runScenario } from '../vehicle/simulate';
import { findEndHour, findSpans } from '../vehicle/spans';
import { checkReading, weighReading, type FieldReading, type RunForReading } from './readings';
import { drawAgain, effectiveCount, FEWEST_EFFECTIVE, weightedMean, weightedQuantile } from './weighted';

/** What is another on each day; everything else belongs to vehicle and mount, and stays. */
const OF_THE_DAY = new Set(['dayMax', 'dayRange', 'driveLength', 'loads', 'startCharge']);
const MOUNT_PRIORS = PRIORS.filter(({ key }) => !OF_THE_DAY.has(key));
const DAY_PRIORS = PRIORS.filter(({ key }) => OF_THE_DAY.has(key));

const EDGE = 0.05;
/** From this move of its middle, or this much left of its spread, an unknown is said to have been learnt about. */
const MOVED_FROM = 0.15;
const NARROWED_TO = 0.95;

/** The day on which something was read: the mount's scenario with that day's weather and legs. */
export interface ReadingDay {
	scenario: Scenario;
	reading: FieldReading;
}

export interface LearningOptions {
	/** Draws of vehicle and mount: a power of two. */
	samples: number;
	/** Draws for the days in a year, before and after. */
	yearSamples: number;
	seed: number;
}

/** What is held possible of the planned day and of a year. */
export interface Belief {
	cutOutShare: number;
	headroomLowK: number;
	headroomMiddleK: number;
	headroomHighK: number;
	year: CutOutDays;
}

/** An unknown about which a reading said something, in standard deviations of what was held before. */
export interface LearntUnknown {
	key: string;
	label: string;
	/** How far its middle moved, and how much is left of its spread. */
	movedBy: number;
	spreadLeft: number;
}

export interface Learning {
	samples: number;
	seed: number;
	/** So many equal draws would say as much as what is left. */
	effectiveSamples: number;
	/** False when hardly a draw agrees: the model, or a reading, is wrong, and nothing is learnt. */
	fits: boolean;
	before: Belief;
	/** The same as before when the readings do not fit. */
	after: Belief;
	unknowns: LearntUnknown[];
}

/** One vehicle and mount with one day for each reading and one for the plan, drawn from one point. */
class Draws {
	private readonly dimensions: number;

	constructor(
		days: number,
		private readonly seed: number
	) {
		this.dimensions = MOUNT_PRIORS.length + DAY_PRIORS.length * (days + 1);
	}

	mountPoint(draw: number): number[] {
		return this.point(draw).slice(0, MOUNT_PRIORS.length);
	}

	/** In the order of all priors, for a day: 0 is the planned one. */
	pointOn(draw: number, day: number): number[] {
		const point = this.point(draw);
		const from = MOUNT_PRIORS.length + day * DAY_PRIORS.length;
		let [mount, ofDay] = [0, from];
		return PRIORS.map(({ key }) => (OF_THE_DAY.has(key) ? point[ofDay++]! : point[mount++]!));
	}

	private point(draw: number): number[] {
		return scrambledSobolPoint(draw, this.dimensions, this.seed);
	}
}

function readRun(drawn: Scenario, reading: FieldReading): RunForReading {
	const run = runScenario(drawn);
	if (run.status === 'failed') return { spans: [], peakC: NaN, tempC: NaN };
	const { report, minutes } = run;
	const spans = findSpans(report.events, 'discharge', findEndHour(drawn));
	if (reading.kind === 'cut-out') return { spans, peakC: NaN, tempC: NaN };
	const at = reading.kind === 'thermometer' ? Math.round((reading.hour - minutes.startHour) * 60) : -1;
	return { spans, peakC: report.peaks[reading.place], tempC: minutes.nodes[reading.place][at] ?? NaN };
}

function describeUnknowns(points: readonly number[][], weights: readonly number[]): LearntUnknown[] {
	return MOUNT_PRIORS.map(({ key, label }, at) => {
		const z = points.map((point) => normalQuantile(point[at]!));
		const movedBy = weightedMean(z, weights);
		const squares = z.map((value) => (value - movedBy) ** 2);
		return { key, label, movedBy, spreadLeft: Math.sqrt(weightedMean(squares, weights)) };
	})
		.filter(({ movedBy, spreadLeft }) => Math.abs(movedBy) > MOVED_FROM || spreadLeft < NARROWED_TO)
		.sort((a, b) => Math.abs(b.movedBy) + 1 - b.spreadLeft - (Math.abs(a.movedBy) + 1 - a.spreadLeft));
}

/** What one drawn day comes to. */
interface PlannedOutcome {
	cutsOut: boolean;
	headroomK: number;
}

function summarise(
	outcomes: readonly PlannedOutcome[],
	weights: readonly number[],
	year: CutOutDays
): Belief {
	const headroomK = outcomes.map((outcome) => outcome.headroomK);
	const quantile = (share: number) => weightedQuantile(headroomK, weights, share);
	return {
		cutOutShare: weightedMean(
			outcomes.map(({ cutsOut }) => (cutsOut ? 1 : 0)),
			weights
		),
		headroomLowK: quantile(EDGE),
		headroomMiddleK: quantile(0.5),
		headroomHighK: quantile(1 - EDGE),
		year
	};
}

/**
 * One number teaches: what readings in the field leave of the unknowns of a mount, and what then is to be expected.
 *
 *     w ∝ Π L(reading | run on the day of the reading);   unknowns of vehicle and mount stay from day to day, the day's do not
 *
 * @param planned the day for which the expectation is made, as it was estimated
 * @param days what was read, each with the scenario of its own day
 * @param year months and days on the road, for the dark days in a year
 * @param options draws and seed
 * @returns as a generator, yields the share of the work done; what was held possible before, what is left after, and the
 *   unknowns that the readings told of, the most first
 * @throws EngineInputError for a reading that cannot be, RunFailedError when a planned day cannot be run to its end
 * Validity: readings independent of each other once vehicle, mount and day are given; the model itself is taken for true;
 * at most 20 readings.
 * Source: Bayes' rule by importance weights on low-discrepancy draws; effective number of draws after Kong, Technical
 * Report 348, University of Chicago (1992).
 * @example
 * const planned = defaultScenario([{ minutes: 60, engineOn: true, speedKmh: 60 }, { minutes: 60 }]);
 * const year = { months: Array(12).fill({ meanMaxC: 20, spreadK: 3 }), daysOnRoad: Array(12).fill(2) };
 * const reading = { kind: 'peak-label', place: 'case', turnedC: null, notTurnedC: 60, withinK: 1 };
 * const work = learnFrom(planned, [{ scenario: planned, reading }], year, { samples: 16, yearSamples: 2, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.fits; // true
 */
export function* learnFrom(
	planned: Scenario,
	days: readonly ReadingDay[],
	year: TouringYear,
	{ samples, yearSamples, seed }: LearningOptions
): Generator<number, Learning> {
	for (const { reading } of days) checkReading(reading);
	const draws = new Draws(days.length, seed);
	const runner = new OutcomeRunner();
	const points: number[][] = [];
	const weights: number[] = [];
	const outcomes: PlannedOutcome[] = [];
	for (let draw = 0; draw < samples; draw++) {
		points.push(draws.mountPoint(draw));
		const drawn = drawScenario(planned, draws.pointOn(draw, 0));
		const { cutsOut, peakSensorC } = runner.run(drawn);
		outcomes.push({ cutsOut, headroomK: drawn.bms.discharge.cut - peakSensorC });
		let weight = 1;
		days.forEach(({ scenario, reading }, at) => {
			if (weight === 0) return;
			weight *= weighReading(reading, readRun(drawScenario(scenario, draws.pointOn(draw, at + 1)), reading));
		});
		weights.push(weight === weight ? weight : 0);
		yield (0.6 * (draw + 1)) / samples;
	}
	const effectiveSamples = effectiveCount(weights);
	// With fewer, the reading lies outside of what was held possible.
	const fits = effectiveSamples >= FEWEST_EFFECTIVE;
	const even = weights.map(() => 1);
	const countYear = (held: readonly number[], from: number): Generator<number, CutOutDays> => {
		const again = drawAgain(held, yearSamples);
		const pointOf = (draw: number) => draws.pointOn(again[draw]!, 0);
		const work = countCutOutDays(planned, year, { samples: yearSamples, seed, pointOf });
		return partOf(work, (share) => from + 0.2 * share);
	};
	const before = summarise(outcomes, even, yield* countYear(even, 0.6));
	const after = fits ? summarise(outcomes, weights, yield* countYear(weights, 0.8)) : before;
	return {
		...{ samples, seed, effectiveSamples, fits, before, after },
		unknowns: fits ? describeUnknowns(points, weights) : []
	};
}
