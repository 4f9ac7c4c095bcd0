import { EngineInputError, requireNotBelow, requirePositive } from '../correlations/require';
import { solveIncreasing } from './solve-increasing';

/** Lanczos' coefficients for g = 7. */
const LANCZOS_G = 7;
const LANCZOS = [
	0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059,
	12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7
];
const SMALLEST = 1e-300;
const RESOLUTION = 1e-16;
const MOST_TERMS = 10_000;

/**
 * Natural logarithm of the gamma function.
 *
 *     ln Γ(a) = ½ ln 2π + (a − ½) ln t − t + ln Σ cₖ/(a − 1 + k),   t = a + g − ½
 *
 * @param a without unit, above zero
 * @returns ln Γ(a)
 * @throws EngineInputError when a is not finite and above zero
 * Validity: all a > 0, to about 14 digits.
 * Source: Lanczos, SIAM J. Numer. Anal. 1 (1964) 86; coefficients for g = 7, n = 9 (from memory, checked against factorials).
 * @example
 * logGamma(0.5); // 0.57236494
 */
export function logGamma(a: number): number {
	requirePositive({ a });
	if (a < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * a)) - logGamma(1 - a);
	const below = a - 1;
	let sum = LANCZOS[0]!;
	for (let k = 1; k < LANCZOS.length; k++) sum += LANCZOS[k]! / (below + k);
	const t = below + LANCZOS_G + 0.5;
	return 0.5 * Math.log(2 * Math.PI) + (below + 0.5) * Math.log(t) - t + Math.log(sum);
}

/** The lower function by its power series, good where x < a + 1. */
function lowerBySeries(a: number, x: number): number {
	let term = 1 / a;
	let sum = term;
	for (let k = 1; k < MOST_TERMS && term > sum * RESOLUTION; k++) {
		term *= x / (a + k);
		sum += term;
	}
	return sum * Math.exp(a * Math.log(x) - x - logGamma(a));
}

/** The upper function by its continued fraction (Lentz' way), good where x ≥ a + 1. */
function upperByFraction(a: number, x: number): number {
	let b = x + 1 - a;
	let c = 1 / SMALLEST;
	let d = 1 / b;
	let fraction = d;
	for (let k = 1; k < MOST_TERMS; k++) {
		const numerator = -k * (k - a);
		b += 2;
		d = 1 / (numerator * d + b || SMALLEST);
		c = b + numerator / c || SMALLEST;
		fraction *= c * d;
		if (Math.abs(c * d - 1) < RESOLUTION * 4) break;
	}
	return fraction * Math.exp(a * Math.log(x) - x - logGamma(a));
}

/**
 * Regularised upper incomplete gamma function: what is left of Γ(a) beyond x.
 *
 *     Q(a, x) = 1/Γ(a) ∫ₓ^∞ t^(a−1) e^(−t) dt
 *
 * @param a shape, without unit, above zero
 * @param x lower limit of the integral, not below zero
 * @returns Q, 0…1; the chance of fewer than a events (a whole) where x are expected
 * @throws EngineInputError when a is not above zero or x below zero
 * Validity: a up to about 1e6; 12 digits or more for a up to 1000.
 * Source: NIST Digital Library of Mathematical Functions, 8.2.4, series 8.11.4, fraction 8.9.2.
 * @example
 * upperGamma(1, 2); // 0.135335283
 */
export function upperGamma(a: number, x: number): number {
	requirePositive({ a });
	requireNotBelow(0, { x });
	if (x === 0) return 1;
	return x < a + 1 ? 1 - lowerBySeries(a, x) : upperByFraction(a, x);
}

/**
 * Regularised lower incomplete gamma function: how much of Γ(a) lies below x.
 *
 *     P(a, x) = 1 − Q(a, x)
 *
 * @param a shape, without unit, above zero
 * @param x upper limit of the integral, not below zero
 * @returns P, 0…1
 * @throws EngineInputError when a is not above zero or x below zero
 * Validity, Source: as upperGamma (8.2.4).
 * @example
 * lowerGamma(0.5, 0.5); // 0.682689492
 */
export function lowerGamma(a: number, x: number): number {
	requirePositive({ a });
	requireNotBelow(0, { x });
	if (x === 0) return 0;
	return x < a + 1 ? lowerBySeries(a, x) : 1 - upperByFraction(a, x);
}

/**
 * Quantile of the gamma distribution with scale 1: the x below which the share p lies.
 *
 *     P(a, x) = p
 *
 * @param a shape, without unit, above zero
 * @param p share, at least 0 and below 1
 * @returns x
 * @throws EngineInputError when a is not above zero or p not within 0 to below 1
 * Validity: as lowerGamma; found by halving an interval until it is one step of a double wide.
 * Source: inversion of NIST Digital Library of Mathematical Functions, 8.2.4.
 * @example
 * gammaQuantile(1, 0.95); // 2.99573227
 */
export function gammaQuantile(a: number, p: number): number {
	requirePositive({ a });
	if (!(p >= 0 && p < 1)) throw new EngineInputError('p', p, 'at least 0 and below 1');
	let high = a + 1;
	while (lowerGamma(a, high) < p) high *= 2;
	return solveIncreasing((x) => lowerGamma(a, x), p, 0, high);
}
