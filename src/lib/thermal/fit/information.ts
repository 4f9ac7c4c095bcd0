import type { FitChannel } from './trace';
import type { Noises } from './noise';
import type { Sensitivities } from './trace-problem';

/** Readings of which it is asked what they tell: those of a row of a trace, at these places. */
export interface Asked {
	trace: number;
	channel: FitChannel;
	row: number;
	at: Int32Array;
}

const zeros = (count: number): number[][] =>
	Array.from({ length: count }, () => new Array<number>(count).fill(0));

/**
 * What readings tell of the parameters.
 *
 *     Iₐᵦ = Σ sₐ sᵦ / (σ² τ),   s = ∂T/∂p
 *
 * @param asked readings
 * @param sensitivities by parameter and trace, K per standard deviation of the prior
 * @param noises what a reading of each channel is worth
 * @returns rows of the Fisher information of the data alone
 */
export function informationOf(
	asked: readonly Asked[],
	sensitivities: Sensitivities,
	noises: Noises
): number[][] {
	const count = sensitivities.length;
	const matrix = zeros(count);
	for (const { trace, channel, row, at } of asked) {
		const worth = noises[channel]!.informationPerK2;
		const columns = sensitivities.map((byTrace) => byTrace[trace]?.[row] ?? null);
		for (let a = 0; a < count; a++) {
			for (let b = 0; b <= a; b++) {
				const [left, right] = [columns[a], columns[b]];
				if (!left || !right) continue;
				let sum = 0;
				for (const place of at) sum += left[place]! * right[place]!;
				matrix[a]![b]! += worth * sum;
				if (a !== b) matrix[b]![a]! += worth * sum;
			}
		}
	}
	return matrix;
}

/** The information of data, `share` of it, and of priors whose standard deviations are 1. */
export function withPriorInformation(data: readonly (readonly number[])[], share = 1): number[][] {
	return data.map((row, a) => row.map((value, b) => share * value + (a === b ? 1 : 0)));
}

export function addMatrices(
	a: readonly (readonly number[])[],
	b: readonly (readonly number[])[]
): number[][] {
	return a.map((row, i) => row.map((value, k) => value + (b[i]?.[k] ?? 0)));
}

/**
 * The inverse of a symmetric matrix that has no direction without length.
 *
 *     A = L Lᵀ,   A⁻¹ = L⁻ᵀ L⁻¹
 *
 * @param matrix rows; symmetric and positive definite
 * @returns rows of the inverse
 * Validity: condition up to about 1e12.
 * Source: Golub and Van Loan, Matrix Computations, 4th ed., section 4.2 (Cholesky).
 * @example
 * invertPositive([[4, 2], [2, 3]])[0]; // [0.375, -0.25]
 */
export function invertPositive(matrix: readonly (readonly number[])[]): number[][] {
	const count = matrix.length;
	const lower = zeros(count);
	const inverse = zeros(count);
	for (let i = 0; i < count; i++) {
		for (let j = 0; j <= i; j++) {
			let sum = matrix[i]![j]!;
			for (let k = 0; k < j; k++) sum -= lower[i]![k]! * lower[j]![k]!;
			lower[i]![j] = i === j ? Math.sqrt(sum) : sum / lower[j]![j]!;
		}
	}
	for (let j = 0; j < count; j++) {
		inverse[j]![j] = 1 / lower[j]![j]!;
		for (let i = j + 1; i < count; i++) {
			let sum = 0;
			for (let k = j; k < i; k++) sum -= lower[i]![k]! * inverse[k]![j]!;
			inverse[i]![j] = sum / lower[i]![i]!;
		}
	}
	return zeros(count).map((row, a) =>
		row.map((_, b) => {
			let sum = 0;
			for (let k = Math.max(a, b); k < count; k++) sum += inverse[k]![a]! * inverse[k]![b]!;
			return sum;
		})
	);
}
