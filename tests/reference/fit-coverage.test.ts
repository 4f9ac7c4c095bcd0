import { describe, expect, it } from 'vitest';
import { parseScenario } from '../../src/lib/thermal';
import { fitCoefficients, type FittedCoefficient } from '../../src/lib/thermal/fit';
import { valueAt } from '../../src/lib/thermal/fit/coefficients';
import { finishWork } from '../../src/lib/thermal/uncertainty/finish-work';
import { inventTrace, normalNumber } from '../support/invent-trace';

const COEFFICIENTS: readonly FittedCoefficient[] = [
	{ group: 'bay', key: 'leakClosed', prior: { law: 'lognormal', middle: 20, spread: 0.4 } },
	{ group: 'position', key: 'bayAirFraction', prior: { law: 'logit-normal', middle: 0.85, spread: 0.7 } },
	{ group: 'battery', key: 'caseCellConductance', prior: { law: 'lognormal', middle: 2.5, spread: 0.35 } }
];
/** Twelve hours: standing, driving, standing, driving slowly, standing. */
const DAY = {
	climate: { tMax: 38 },
	start: { hour: 8, soc: 0.6 },
	legs: [
		{ minutes: 60 },
		{ minutes: 120, engineOn: true, speedKmh: 80, loadA: 4 },
		{ minutes: 180, loadA: 6 },
		{ minutes: 120, engineOn: true, speedKmh: 40, loadA: 4 },
		{ minutes: 240, loadA: 6 }
	]
};
const KNOWN = parseScenario(DAY);
/** Readings of five minutes each, off by 0.3 K, of which 80 % are left a minute later; those of the air, too. */
const NOISE = { sdK: 0.3, keepsAMinute: 0.8 };
const AIR_ERROR = { sdK: NOISE.sdK, alikeMin: (1 + NOISE.keepsAMinute) / (1 - NOISE.keepsAMinute) };
const RUNS = 200;
const CHUNK = 50;
const DRAWN = 77;

/** One run: a truth drawn from the priors, a day invented with it, a fit; whether each interval holds the truth. */
function runOnce(seed: number): boolean[] {
	const truth = COEFFICIENTS.map(({ prior }, at) => valueAt(prior, normalNumber(DRAWN, seed, at)));
	const [leakClosed, bayAirFraction, caseCellConductance] = truth;
	const scenario = parseScenario({
		...DAY,
		...{ bay: { leakClosed }, position: { bayAirFraction }, battery: { caseCellConductance } }
	});
	const channels = ['bayAirC', 'caseC', 'cellC'] as const;
	const trace = inventTrace({ scenario, channels, noise: NOISE, seed, everyMin: 5 });
	const fit = finishWork(
		fitCoefficients({
			traces: [{ trace, scenario: KNOWN }],
			coefficients: COEFFICIENTS,
			book: {},
			options: { airError: AIR_ERROR }
		})
	);
	if (fit.status === 'failed' || fit.stopped !== 'converged') throw new Error(fit.reason);
	return fit.estimates.map(({ low, high }, at) => low <= truth[at]! && truth[at]! <= high);
}

const chunks: boolean[][][] = [];
function runChunk(chunk: number): boolean[][] {
	return (chunks[chunk] ??= Array.from({ length: CHUNK }, (_, at) => runOnce(chunk * CHUNK + at)));
}
const allRuns = () => Array.from({ length: RUNS / CHUNK }, (_, chunk) => runChunk(chunk)).flat();
const shareOf = (held: readonly boolean[]) => held.filter(Boolean).length / held.length;

/** Of 200 intervals that hold with nine chances in ten, 170 to 190 hold the truth (2.4 standard deviations either way). */
const LEAST = 0.85;
const MOST = 0.95;
const PATIENCE_MS = 120_000;

describe('intervals of nine chances in ten, over 200 invented days with a truth drawn from the priors', () => {
	it.each(Array.from({ length: RUNS / CHUNK }, (_, chunk) => chunk))(
		'come of fits that converge, part %i of the runs',
		(chunk) => {
			expect(runChunk(chunk)).toHaveLength(CHUNK);
		},
		PATIENCE_MS
	);

	it.each(COEFFICIENTS.map(({ group, key }, at) => ({ name: `${group}.${key}`, at })))(
		'hold the truth of $name in 85 to 95 of 100 runs',
		({ at }) => {
			const share = shareOf(allRuns().map((held) => held[at]!));
			expect(share).toBeGreaterThanOrEqual(LEAST);
			expect(share).toBeLessThanOrEqual(MOST);
		},
		4 * PATIENCE_MS
	);

	it(
		'hold the truth in 85 to 95 of 100 all together',
		() => {
			const share = shareOf(allRuns().flat());
			expect(share).toBeGreaterThanOrEqual(LEAST);
			expect(share).toBeLessThanOrEqual(MOST);
		},
		4 * PATIENCE_MS
	);
});
