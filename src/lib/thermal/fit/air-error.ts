import { requirePositive } from '../correlations/require';
import type { FitSetup } from './fit-setup';
import { pullOf } from './information';
import type { Noises } from './noise';
import { zeros } from './small-matrices';
import { isMeasured } from './trace';
import type { Sensitivities, TraceProblem } from './trace-problem';

/** How far the outside air may really have been from what was read, and for how long it is off alike. */
export interface AirError {
	/** K. */
	sdK: number;
	/** Area under the correlation of the error with itself, both sides, min: (1 + φ)/(1 − φ) where φ is left after a minute. */
	alikeMin: number;
}

/** A shaded sensor that sees a little of the engine's warmth; engineering judgement. */
export const READ_AIR_ERROR: AirError = { sdK: 0.3, alikeMin: 15 };
/** A day's curve in the place of readings; engineering judgement. */
const PLANNED_AIR_ERROR: AirError = { sdK: 1.5, alikeMin: 360 };
/** What is tried on the air is no shorter than this, min. */
const SHORTEST_MIN = 30;
const S_PER_MIN = 60;

export function requireAirError({ sdK, alikeMin }: AirError): void {
	requirePositive({ 'options.airError.sdK': sdK, 'options.airError.alikeMin': alikeMin });
}

/**
 * What the error of the outside air does to the pull of the data on the parameters.
 *
 *     A = B Q Bᵀ,   B = Σ s g / (σ² τ),   g: change of what is foretold with 1 K at one time,   Q = sd² · alike/apart
 *
 * @returns as a generator, yields the share of the work done; the variance of the pulls, one row a parameter
 */
export function* findAirPull(
	setup: FitSetup,
	problem: TraceProblem,
	parameters: readonly number[],
	sensitivities: Sensitivities,
	noises: Noises,
	read: AirError
): Generator<number, number[][]> {
	const pulled = zeros(sensitivities.length);
	const values = problem.valuesAt(parameters);
	for (const trace of setup.all) {
		const model = setup.models[trace]!;
		const measured = isMeasured(setup.traceAt(trace).trace.channels.ambientC);
		const { sdK, alikeMin } = measured ? read : PLANNED_AIR_ERROR;
		const apartS = S_PER_MIN * Math.max(alikeMin, SHORTEST_MIN);
		const variance = (sdK * sdK * alikeMin * S_PER_MIN) / apartS;
		const starts = problem.startsAt(parameters, trace);
		const before = model.predict(values, starts);
		for (let atS = 0; atS <= model.lengthS; atS += apartS) {
			const after = model.predictWarmer(values, starts, atS, apartS);
			const changed = after.map((row, k) => row.map((value, at) => value - before[k]![at]!));
			const pull = pullOf(problem.blocks, sensitivities, trace, changed, noises);
			pull.forEach((a, i) => pull.forEach((b, k) => (pulled[i]![k]! += variance * a * b)));
			yield (trace + atS / model.lengthS) / setup.all.length;
		}
	}
	return pulled;
}
