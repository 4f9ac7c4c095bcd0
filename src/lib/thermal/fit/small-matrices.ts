/** A matrix by its rows. */
export type Rows = readonly (readonly number[])[];

export const zeros = (count: number): number[][] =>
	Array.from({ length: count }, () => new Array<number>(count).fill(0));

export function addMatrices(a: Rows, b: Rows): number[][] {
	return a.map((row, i) => row.map((value, k) => value + (b[i]?.[k] ?? 0)));
}

export function scaleMatrix(a: Rows, by: number): number[][] {
	return a.map((row) => row.map((value) => by * value));
}

export function multiply(a: Rows, b: Rows): number[][] {
	return a.map((row) =>
		(b[0] ?? []).map((_, k) => row.reduce((sum, value, at) => sum + value * b[at]![k]!, 0))
	);
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
 * invertPositive([[4, 2], [2, 5]])[0]; // [0.3125, -0.125]
 */
export function invertPositive(matrix: Rows): number[][] {
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
