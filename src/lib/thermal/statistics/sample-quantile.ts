import { EngineInputError, requireWithin } from '../correlations/require';

/**
 * Quantile of a sample: straight lines between the sorted values, the lowest at 0 and the highest at 1.
 *
 *     Q(p) = x₍ⱼ₎ + (h − j)(x₍ⱼ₊₁₎ − x₍ⱼ₎),   h = (n − 1) p + 1,  j = ⌊h⌋
 *
 * @param values at least one finite number, in any order; left as they are
 * @param p share of the sample below, within 0 to 1
 * @returns the value, in the unit of the sample
 * @throws EngineInputError when a value is not finite, there is none, or p is outside 0 to 1
 * Validity: any sample; of the nine definitions in use this is the seventh, which most programs take.
 * Source: Hyndman and Fan, Sample quantiles in statistical packages, The American Statistician 50 (1996) 361, definition 7.
 * @example
 * sampleQuantile([4, 1, 3, 2], 0.25); // 1.75
 */
export function sampleQuantile(values: readonly number[], p: number): number {
	requireWithin(0, 1, { p });
	if (values.length === 0) throw new EngineInputError('values.length', 0, 'at least 1');
	for (const value of values) {
		if (!Number.isFinite(value)) throw new EngineInputError('values', value, 'finite numbers');
	}
	const sorted = Float64Array.from(values).sort();
	const place = (sorted.length - 1) * p;
	const below = Math.floor(place);
	const low = sorted[below]!;
	const high = sorted[Math.min(below + 1, sorted.length - 1)]!;
	return low + (place - below) * (high - low);
}
