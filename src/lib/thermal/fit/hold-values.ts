import type { FitSetup } from './fit-setup';
import type { Noises } from './noise';
import type { Loss } from './robust-loss';
import { Search } from './search';

/**
 * Residuals with coefficients that stay as they are, from the start temperatures that fit best to them: what a fit is to be
 * compared with, because it had its start temperatures fitted along.
 *
 * @returns as a generator, yields whenever some of the work is done; model less reading, K, block by block
 */
export function* holdValues(
	setup: FitSetup,
	values: readonly (number | null)[],
	noises: Noises,
	loss: Loss
): Generator<void, Float64Array[]> {
	const problem = setup.startsProblemOf(values);
	if (problem.count === 0) return problem.residuals([]);
	const search = new Search(problem.toLeastSquares(problem.middle(), noises, loss));
	yield* search.run();
	return problem.residuals(search.parameters);
}
