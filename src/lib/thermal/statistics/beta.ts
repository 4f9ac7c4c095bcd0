import { requirePositive, requireWithin } from '../correlations/require';
import { logGamma } from './gamma';
import { solveIncreasing } from './solve-increasing';

const SMALLEST = 1e-300;
const RESOLUTION = 1e-15;
const MOST_TERMS = 10_000;

/** The continued fraction of the incomplete beta function (Lentz' way), good where x < (a + 1)/(a + b + 2). */
function betaFraction(x: number, a: number, b: number): number {
	let c = 1;
	let d = 1 / (1 - ((a + b) * x) / (a + 1) || SMALLEST);
	let fraction = d;
	const advance = (numerator: number): number => {
		d = 1 / (1 + numerator * d || SMALLEST);
		c = 1 + numerator / c || SMALLEST;
		fraction *= c * d;
		return Math.abs(c * d - 1);
	};
	for (let m = 1; m < MOST_TERMS; m++) {
		const even = a + 2 * m;
		advance((m * (b - m) * x) / ((even - 1) * even));
		if (advance((-(a + m) * (a + b + m) * x) / (even * (even + 1))) < RESOLUTION) break;
	}
	return fraction;
}

/**
 * Regularised incomplete beta function: the share of a beta distribution below x.
 *
 *     I_x(a, b) = Γ(a+b)/(Γ(a)Γ(b)) ∫₀ˣ t^(a−1) (1−t)^(b−1) dt
 *
 * @param x within 0 to 1
 * @param a first shape, above zero
 * @param b second shape, above zero
 * @returns I, 0…1
 * @throws EngineInputError when x is outside 0 to 1 or a shape not above zero
 * Validity: shapes up to about 1e5; 12 digits or more up to 1000.
 * Source: NIST Digital Library of Mathematical Functions, 8.17.2 and continued fraction 8.17.22.
 * @example
 * incompleteBeta(0.5, 2, 3); // 0.6875
 */
export function incompleteBeta(x: number, a: number, b: number): number {
	requireWithin(0, 1, { x });
	requirePositive({ a, b });
	if (x === 0 || x === 1) return x;
	const logFront = logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x);
	const front = Math.exp(logFront);
	if (x < (a + 1) / (a + b + 2)) return (front * betaFraction(x, a, b)) / a;
	return 1 - (front * betaFraction(1 - x, b, a)) / b;
}

/**
 * Quantile of the beta distribution: the x below which the share p lies.
 *
 *     I_x(a, b) = p
 *
 * @param p share, within 0 to 1
 * @param a first shape, above zero
 * @param b second shape, above zero
 * @returns x, 0…1
 * @throws EngineInputError when p is outside 0 to 1 or a shape not above zero
 * Validity: as incompleteBeta; found by halving an interval until it is one step of a double wide.
 * Source: inversion of NIST Digital Library of Mathematical Functions, 8.17.2.
 * @example
 * betaQuantile(0.6875, 2, 3); // 0.5
 */
export function betaQuantile(p: number, a: number, b: number): number {
	requireWithin(0, 1, { p });
	requirePositive({ a, b });
	if (p === 0 || p === 1) return p;
	return solveIncreasing((x) => incompleteBeta(x, a, b), p, 0, 1);
}
