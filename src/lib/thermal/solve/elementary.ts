/**
 * Elementary functions from IEEE additions, multiplications, divisions and square roots alone.
 *
 * Those of the language may differ in the last digit between one browser and the next; these give the same digits
 * everywhere, and none of them leaves compiled code.
 */

const LN2_HIGH = 6.9314718036912381649e-1;
const LN2_LOW = 1.90821492927058770002e-10;
const PER_LN2 = 1.442695040888963387;
const LARGEST_EXPONENT = 709.782712893384;
const SMALLEST_EXPONENT = -745.1332191019411;
const MOST_HALVINGS = 1075;

/** 2^k for k from −1075 to 1024, each made exactly from its neighbour. */
const POWERS_OF_TWO = (() => {
	const powers = new Float64Array(MOST_HALVINGS + 1025);
	powers[MOST_HALVINGS] = 1;
	for (let k = MOST_HALVINGS + 1; k < powers.length; k++) powers[k] = powers[k - 1]! * 2;
	for (let k = MOST_HALVINGS - 1; k >= 0; k--) powers[k] = powers[k + 1]! / 2;
	return powers;
})();

/**
 * The exponential function.
 *
 *     e^x = 2^k e^r,  r = x − k ln 2,  e^r = 1 + 2r / (2 − (r − r² P(r²)))·…  (a rational approximation)
 *
 * @param x any number
 * @returns e^x to within 1 unit in the last place; Infinity above 709.78, 0 below −745.13, NaN for NaN
 * Validity: all numbers.
 * Source: the rational approximation of the C library fdlibm 5.3, e_exp.c (Sun Microsystems, free to use).
 * @example
 * expOf(1); // 2.718281828
 */
export function expOf(x: number): number {
	if (!(x < LARGEST_EXPONENT)) return x >= LARGEST_EXPONENT ? Infinity : NaN;
	if (x < SMALLEST_EXPONENT) return 0;
	const k = Math.floor(PER_LN2 * x + 0.5);
	const high = x - k * LN2_HIGH;
	const low = k * LN2_LOW;
	const r = high - low;
	const t = r * r;
	const c =
		r -
		t *
			(1.66666666666666019037e-1 +
				t *
					(-2.77777777770155933842e-3 +
						t *
							(6.61375632143793436117e-5 + t * (-1.6533902205465251539e-6 + t * 4.13813679705723846039e-8))));
	const value = 1 - (low - (r * c) / (2 - c) - high);
	// In two halves, so that neither the largest nor the smallest results are lost on the way.
	const half = k >> 1;
	return value * POWERS_OF_TWO[MOST_HALVINGS + half]! * POWERS_OF_TWO[MOST_HALVINGS + k - half]!;
}

const ROOT_STEPS = 5;

/**
 * The fifth root, by Newton's rule.
 *
 *     y = y − (y⁵ − x) / (5 y⁴)
 *
 * @param x a number, not below 0
 * @returns x^⅕ to within a few units in the last place; NaN below 0
 * Validity: all numbers from 0.
 * Source: Newton's rule; the start is a quadratic through 1/32, 1/4 and 1.
 * @example
 * fifthRootOf(0.00032); // 0.2
 */
export function fifthRootOf(x: number): number {
	if (!(x > 0 && x < Infinity)) return x === 0 || x === Infinity ? x : NaN;
	let scaled = x;
	let shrink = 1;
	while (scaled > 1) {
		scaled /= 32;
		shrink *= 2;
	}
	while (scaled < 1 / 32) {
		scaled *= 32;
		shrink /= 2;
	}
	let root = 0.4697 + scaled * (1.1207 - 0.5904 * scaled);
	for (let k = 0; k < ROOT_STEPS; k++) {
		const square = root * root;
		const fourth = square * square;
		root -= (fourth * root - scaled) / (5 * fourth);
	}
	return root * shrink;
}

/** (−1)^k / (2k + 1)! for k from 10 downwards. */
const SINE_SERIES = Float64Array.of(
	1 / 51090942171709440000,
	-1 / 121645100408832000,
	1 / 355687428096000,
	-1 / 1307674368000,
	1 / 6227020800,
	-1 / 39916800,
	1 / 362880,
	-1 / 5040,
	1 / 120,
	-1 / 6,
	1
);

/**
 * The sine between 0 and π, by its series.
 *
 *     sin x = Σ (−1)^k x^(2k+1) / (2k+1)!,  sin x = sin(π − x)
 *
 * @param x angle, rad, from 0 to π
 * @returns sin x to 1e-15
 * Validity: 0 ≤ x ≤ π; NaN outside.
 * Source: Taylor's series to the term of degree 21.
 * @example
 * sineOf(Math.PI / 6); // 0.5
 */
export function sineOf(x: number): number {
	if (!(x >= 0 && x <= Math.PI)) return NaN;
	const angle = x > Math.PI / 2 ? Math.PI - x : x;
	const square = angle * angle;
	let sum = 0;
	for (let k = 0; k < SINE_SERIES.length; k++) sum = sum * square + SINE_SERIES[k]!;
	return sum * angle;
}
