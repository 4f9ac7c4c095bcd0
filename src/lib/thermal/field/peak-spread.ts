import { sampleQuantile, scrambledSobolPoint, standardDeviation } from '../statistics';
import type { Scenario } from '../types';
import { drawScenario } from '../uncertainty/draw-scenario';
import { PRIORS } from '../uncertainty/priors';
import { runScenario } from '../vehicle/simulate';
import type { ReadingPlace } from './readings';

const EDGE = 0.05;

/** How hot a place of the battery gets on a day, as the estimate holds it possible. */
export interface PeakSpread {
	samples: number;
	seed: number;
	/** One day in twenty stays below, the middle, one in twenty gets above. */
	lowC: number;
	middleC: number;
	highC: number;
	/** Standard deviation of the drawn days. */
	sdK: number;
}

/**
 * What an estimate says of the hottest that a place of the battery gets on a day: what a label there should show.
 *
 *     quantiles 0.05, 0.5, 0.95 and standard deviation of the peak over draws of what is not known
 *
 * @param scenario the mount on that day
 * @param place where the label is
 * @param options number of draws (a power of two keeps them even) and seed
 * @returns as a generator, yields the share of the work done, and returns the spread; null when fewer than two draws
 *   could be run to their ends
 * Validity: the priors of PRIORS, independent of one another; one day, as the label's hottest.
 * Source: Owen, Randomly permuted (t,m,s)-nets (1995) for the points.
 * @example
 * const work = spreadPeak(defaultScenario([{ minutes: 60 }]), 'case', { samples: 8, seed: 1 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.lowC < step.value.highC; // true
 */
export function* spreadPeak(
	scenario: Scenario,
	place: ReadingPlace,
	{ samples, seed }: { samples: number; seed: number }
): Generator<number, PeakSpread | null> {
	const peaks: number[] = [];
	for (let draw = 0; draw < samples; draw++) {
		const run = runScenario(drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, seed)));
		if (run.status !== 'failed') peaks.push(run.report.peaks[place]);
		yield (draw + 1) / samples;
	}
	if (peaks.length < 2) return null;
	const [lowC, middleC, highC] = [EDGE, 0.5, 1 - EDGE].map((share) => sampleQuantile(peaks, share));
	return {
		...{ samples, seed, sdK: standardDeviation(peaks) },
		...{ lowC: lowC!, middleC: middleC!, highC: highC! }
	};
}
