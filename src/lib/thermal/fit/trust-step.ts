import { norm, solveLower, solveUpper, triangularise, type Columns, type Triangle } from './householder';

const MOST_TRIES = 10;
/** A step may be so much longer or shorter than the radius. */
const SLACK = 0.1;

export interface TrustStep {
	step: Float64Array;
	/** λ: 0 where the whole Gauss–Newton step lies within the radius. */
	damping: number;
}

const multiply = (a: Float64Array, b: Float64Array): Float64Array => a.map((value, k) => value * b[k]!);

/** The triangle of R with √λ D set under it. */
function damp({ r, qb }: Triangle, scales: Float64Array, damping: number): Triangle {
	const count = r.length;
	const root = Math.sqrt(damping);
	const stacked: Columns = r.map((column, j) => {
		const tall = new Float64Array(2 * count);
		tall.set(column.subarray(0, j + 1));
		tall[count + j] = root * scales[j]!;
		return tall;
	});
	const right = new Float64Array(2 * count);
	right.set(qb);
	return triangularise(stacked, right);
}

/** Slope of ‖D δ(λ)‖ over λ. */
function slope(triangle: Triangle, scales: Float64Array, scaled: Float64Array): number {
	const length = norm(scaled);
	const unit = multiply(scales, scaled).map((value) => value / length);
	return -(norm(solveLower(triangle.r, unit)) ** 2) * length;
}

/** ‖D⁻¹ Rᵀ Qb‖: how steep the sum of squares is, in the scales of the parameters. */
function steepness({ r, qb }: Triangle, scales: Float64Array): number {
	const gradient = Float64Array.from(r, (column, j) => {
		let sum = 0;
		for (let row = 0; row <= j; row++) sum += column[row]! * qb[row]!;
		return sum / scales[j]!;
	});
	return norm(gradient);
}

/**
 * The step that lowers the linearised sum of squares most within a radius.
 *
 *     min ‖ R δ − Qb ‖  with  ‖ D δ ‖ ≤ Δ;   (RᵀR + λ D²) δ = Rᵀ Qb with λ such that ‖ D δ ‖ ≈ Δ
 *
 * @param triangle R and Qb of the Jacobian and the residuals turned round
 * @param scales diagonal of D, above zero
 * @param radius Δ, above zero
 * @returns δ within a tenth of the radius or inside it, and λ
 * Validity: λ is found by Newton's rule kept between two ends, in ten tries at most.
 * Source: Moré, The Levenberg–Marquardt algorithm: implementation and theory, Lect. Notes Math. 630 (1978) 105, section 5.
 * @example
 * findTrustStep({ r: [Float64Array.of(2)], qb: Float64Array.of(8) }, Float64Array.of(1), 10).step[0]; // 4
 */
export function findTrustStep(triangle: Triangle, scales: Float64Array, radius: number): TrustStep {
	const whole = solveUpper(triangle);
	const wholeScaled = whole && multiply(scales, whole);
	if (whole && wholeScaled && norm(wholeScaled) <= (1 + SLACK) * radius) return { step: whole, damping: 0 };

	let high = steepness(triangle, scales) / radius;
	let low = 0;
	if (wholeScaled && wholeScaled.every(Number.isFinite)) {
		low = (radius - norm(wholeScaled)) / slope(triangle, scales, wholeScaled);
	}
	let damping = Math.max(low, 0.001 * high);
	for (let tries = 1; ; tries++) {
		if (!(damping > low && damping < high)) damping = Math.max(0.001 * high, Math.sqrt(low * high));
		const damped = damp(triangle, scales, damping);
		const step = solveUpper(damped) ?? new Float64Array(scales.length);
		const scaled = multiply(scales, step);
		const excess = norm(scaled) - radius;
		if (Math.abs(excess) <= SLACK * radius || tries === MOST_TRIES) return { step, damping };
		if (excess > 0) low = damping;
		else high = damping;
		damping -= ((excess + radius) / radius) * (excess / slope(damped, scales, scaled));
	}
}
