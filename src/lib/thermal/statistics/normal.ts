import { EngineInputError } from '../correlations/require';
import { lowerGamma, upperGamma } from './gamma';

/** Coefficients of Wichura's rational functions from the constant upwards: near the middle, between, in the tail. */
const MIDDLE = {
	top: [
		3.3871328727963665, 1.3314166789178438e2, 1.9715909503065513e3, 1.373169376550946e4, 4.592195393154987e4,
		6.72657709270087e4, 3.343057558358813e4, 2.5090809287301227e3
	],
	bottom: [
		1, 4.231333070160091e1, 6.871870074920579e2, 5.394196021424751e3, 2.1213794301586597e4,
		3.930789580009271e4, 2.8729085735721943e4, 5.226495278852854e3
	]
};
const BETWEEN = {
	top: [
		1.4234371107496835, 4.630337846156546, 5.769497221460691, 3.6478483247632045, 1.2704582524523684,
		2.417807251774506e-1, 2.2723844989269184e-2, 7.745450142783414e-4
	],
	bottom: [
		1, 2.053191626637759, 1.6763848301838038, 6.897673349851e-1, 1.4810397642748008e-1, 1.5198666563616457e-2,
		5.475938084995345e-4, 1.0507500716444169e-9
	]
};
const TAIL = {
	top: [
		6.657904643501103, 5.463784911164114, 1.7848265399172913, 2.9656057182850487e-1, 2.6532189526576124e-2,
		1.2426609473880784e-3, 2.7115555687434876e-5, 2.0103343992922881e-7
	],
	bottom: [
		1, 5.99832206555888e-1, 1.369298809227358e-1, 1.4875361290850615e-2, 7.868691311456133e-4,
		1.8463183175100548e-5, 1.421511758316446e-7, 2.0442631033899397e-15
	]
};

function evaluate(coefficients: readonly number[], x: number): number {
	return coefficients.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
}
const divide = ({ top, bottom }: typeof MIDDLE, x: number): number => evaluate(top, x) / evaluate(bottom, x);

/**
 * Quantile of the standard normal distribution: the x below which the share p lies.
 *
 *     Φ(x) = p, by rational functions of (p − ½)² or of √(−ln min(p, 1 − p))
 *
 * @param p share, above 0 and below 1
 * @returns x, without unit
 * @throws EngineInputError when p is not above 0 and below 1
 * Validity: about 16 digits wherever p is. Math.log and Math.sqrt are used beyond |p − ½| = 0.425: an engine other than
 * V8 may give another last digit there.
 * Source: Wichura, Algorithm AS 241, PPND16, Applied Statistics 37 (1988) 477; coefficients from memory, checked to 1e-15.
 * @example
 * normalQuantile(0.975); // 1.9599639845
 */
export function normalQuantile(p: number): number {
	if (!(p > 0 && p < 1)) throw new EngineInputError('p', p, 'above 0 and below 1');
	const fromMiddle = p - 0.5;
	if (Math.abs(fromMiddle) <= 0.425) return fromMiddle * divide(MIDDLE, 0.180625 - fromMiddle * fromMiddle);
	const root = Math.sqrt(-Math.log(Math.min(p, 1 - p)));
	const size = root <= 5 ? divide(BETWEEN, root - 1.6) : divide(TAIL, root - 5);
	return fromMiddle < 0 ? -size : size;
}

/**
 * Share of the standard normal distribution below x.
 *
 *     Φ(x) = ½ Q(½, x²/2) for x < 0,  ½ + ½ P(½, x²/2) else
 *
 * @param x without unit; may be infinite
 * @returns Φ, 0…1
 * @throws EngineInputError when x is not a number
 * Validity: 13 digits, in the lower tail too.
 * Source: NIST Digital Library of Mathematical Functions, 7.11.1 and 7.11.2.
 * @example
 * normalCdf(-1.96); // 0.0249978951
 */
export function normalCdf(x: number): number {
	if (Number.isNaN(x)) throw new EngineInputError('x', x, 'a number');
	if (!Number.isFinite(x)) return x < 0 ? 0 : 1;
	return x < 0 ? 0.5 * upperGamma(0.5, (x * x) / 2) : 0.5 + 0.5 * lowerGamma(0.5, (x * x) / 2);
}
