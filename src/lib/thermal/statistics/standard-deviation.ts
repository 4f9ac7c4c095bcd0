import { EngineInputError } from '../correlations/require';

/**
 * How far values of a sample lie from their mean.
 *
 *     s = √( Σ (x − x̄)² / (n − 1) )
 *
 * @param values at least two finite numbers
 * @returns standard deviation, in the unit of the values
 * @throws EngineInputError when there are fewer than two
 * Validity: two passes, so that a large mean costs no digits.
 * Source: the unbiased estimate of a variance, any book of statistics.
 * @example
 * standardDeviation([2, 4, 4, 4, 5, 5, 7, 9]); // 2.138
 */
export function standardDeviation(values: readonly number[]): number {
	const { length } = values;
	if (length < 2) throw new EngineInputError('values.length', length, 'at least 2');
	const mean = values.reduce((sum, value) => sum + value, 0) / length;
	return Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (length - 1));
}
