/** Pairs of readings further apart than this share of a series are too few to say how alike they are. */
const FARTHEST_SHARE = 0.25;

/** Sums of products of values a lag apart, over all series; a pair with a missing value does not count. */
function correlateAt(series: readonly Float64Array[], lag: number): number {
	let sum = 0;
	let pairs = 0;
	for (const values of series) {
		for (let at = lag; at < values.length; at++) {
			const product = values[at]! * values[at - lag]!;
			if (product !== product) continue;
			sum += product;
			pairs++;
		}
	}
	return pairs > 0 ? sum / pairs : 0;
}

/**
 * How many readings in a row say as much as one independent one.
 *
 *     τ = −1 + 2 Σ Γₖ,   Γₖ = ρ(2k) + ρ(2k + 1),   summed while Γ is above 0 and held from rising
 *
 * ρ is counted from zero, not from the mean of the residuals: a lasting misfit counts as what hangs together.
 *
 * @param series residuals in order, evenly spaced, NaN where missing; several are taken together
 * @returns τ, at least 1
 * Validity: series many times longer than what hangs together in them; in shorter ones τ comes out too low.
 * Source: Geyer, Practical Markov chain Monte Carlo, Statistical Science 7 (1992) 473, initial monotone sequence estimator.
 * @example
 * countPerIndependent([Float64Array.of(1, 1, 1, 1, -1, -1, -1, -1)]); // 2.695
 */
export function countPerIndependent(series: readonly Float64Array[]): number {
	const variance = correlateAt(series, 0);
	if (!(variance > 0)) return 1;
	const farthest = FARTHEST_SHARE * Math.max(...series.map(({ length }) => length));
	let sum = 0;
	let least = Infinity;
	for (let lag = 0; lag <= farthest; lag += 2) {
		const pair = (correlateAt(series, lag) + correlateAt(series, lag + 1)) / variance;
		if (pair <= 0) break;
		least = Math.min(least, pair);
		sum += least;
	}
	return Math.max(1, 2 * sum - 1);
}
