import { EngineInputError } from '../correlations/require';
import { hashWords } from './integer-hash';
import { requireWhole } from './require-whole';
import { SOBOL_DIMENSIONS, scrambledSobolCoordinate } from './sobol';

export interface SensitivityOptions {
	/** How many inputs, 1…64. */
	dimensions: number;
	/** Points in each of the two matrices of a replicate: a power of two. */
	pointsEach: number;
	/** Independent scramblings, at least 2: their spread gives the standard errors. */
	replicates: number;
	/** A whole number below 2³². */
	seed: number;
}

/** Where a model has to be evaluated: replicate by replicate, row by row, and in a row A, B, AB₁ … AB_D. */
export interface SensitivityPlan extends SensitivityOptions {
	/** How many evaluations: replicates · pointsEach · (dimensions + 2). */
	count: number;
	/** The point of one evaluation in the unit cube, each coordinate above 0 and below 1. */
	pointAt: (evaluation: number) => number[];
}

function requireOptions({ dimensions, pointsEach, replicates, seed }: SensitivityOptions): void {
	requireWhole(1, SOBOL_DIMENSIONS / 2, { dimensions });
	requireWhole(2, 1000, { replicates });
	requireWhole(0, 2 ** 32 - 1, { seed });
	if (!(pointsEach >= 2 && pointsEach <= 2 ** 24 && Number.isInteger(Math.log2(pointsEach)))) {
		throw new EngineInputError('pointsEach', pointsEach, 'a power of two within 2 to 2^24');
	}
}

/**
 * Plans the evaluations that a variance-based sensitivity analysis needs, so that they can be made in any order or place.
 *
 *     A: coordinates 1…D of a scrambled Sobol point, B: coordinates D+1…2D, ABᵢ: A with coordinate i out of B
 *
 * @param options number of inputs and of points, replicates, seed
 * @returns how many evaluations, and the point of each
 * @throws EngineInputError when a number of the options is not whole or outside its limits, or no such evaluation exists
 * Validity: independent inputs; turn coordinates into inputs by the quantile function of each.
 * Source: Saltelli, Annoni, Azzini, Campolongo, Ratto and Tarantola, Comput. Phys. Commun. 181 (2010) 259, section 3.
 * @example
 * planSensitivity({ dimensions: 3, pointsEach: 64, replicates: 8, seed: 1 }).count; // 2560
 */
export function planSensitivity(options: SensitivityOptions): SensitivityPlan {
	requireOptions(options);
	const { dimensions, pointsEach, replicates, seed } = options;
	const perRow = dimensions + 2;
	const count = replicates * pointsEach * perRow;
	const pointAt = (evaluation: number): number[] => {
		requireWhole(0, count - 1, { evaluation });
		const row = Math.floor(evaluation / perRow);
		const matrix = evaluation % perRow;
		const replicateSeed = hashWords(seed, Math.floor(row / pointsEach));
		return Array.from({ length: dimensions }, (_, input) => {
			const fromB = matrix === 1 || matrix === input + 2;
			return scrambledSobolCoordinate(row % pointsEach, fromB ? dimensions + input : input, replicateSeed);
		});
	};
	return { ...options, count, pointAt };
}
