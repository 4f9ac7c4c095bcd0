import type { Bounds } from './problem';
import type { Columns } from './householder';

/** Cube root of the resolution of a double: where cutting and rounding errors of a central difference balance. */
const RELATIVE_STEP = Math.cbrt(2 ** -52);

/** Keeps a parameter within its ends. */
export function clamp(value: number, bounds: Bounds | null | undefined): number {
	const { low = -Infinity, high = Infinity } = bounds ?? {};
	return Math.min(high, Math.max(low, value));
}

/**
 * Derivatives of the residuals by central differences, one-sided where a bound is in the way.
 *
 *     ∂r/∂p ≈ [ r(p + h) − r(p − h) ] / 2h,   h = ∛ε · |p|, or ∛ε · scale where p is 0
 *
 * @param evaluate residuals at given parameters
 * @param parameters where
 * @param scales size of each parameter where it is 0 itself
 * @param bounds ends that must not be passed
 * @returns one column a parameter; not finite where the residuals are not
 * Validity: smooth residuals; about ten digits.
 * Source: Press et al., Numerical Recipes, 3rd ed., section 5.7.
 * @example
 * differentiate(([p]) => Float64Array.of(p * p), [3], [1], [null])[0][0]; // 6.000000
 */
export function differentiate(
	evaluate: (parameters: readonly number[]) => Float64Array,
	parameters: readonly number[],
	scales: readonly number[],
	bounds: readonly (Bounds | null)[]
): Columns {
	return parameters.map((value, at) => {
		const step = RELATIVE_STEP * (value === 0 ? scales[at]! : Math.abs(value));
		const [below, above] = [clamp(value - step, bounds[at]), clamp(value + step, bounds[at])];
		const move = (to: number) => parameters.map((old, k) => (k === at ? to : old));
		const [low, high] = [evaluate(move(below)), evaluate(move(above))];
		return high.map((residual, k) => (residual - low[k]!) / (above - below));
	});
}
