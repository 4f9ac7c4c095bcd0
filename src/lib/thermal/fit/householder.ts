/** A matrix by its columns, each as long as the matrix is high. */
export type Columns = Float64Array[];

/** What is left of a matrix and a right-hand side after reflections: R above the diagonal, Qᵀb beside it. */
export interface Triangle {
	/** By columns; only the first entries, down to the diagonal, count. */
	r: Columns;
	/** As many entries as there are columns. */
	qb: Float64Array;
}

function dot(a: Float64Array, b: Float64Array, from: number): number {
	let sum = 0;
	for (let k = from; k < a.length; k++) sum += a[k]! * b[k]!;
	return sum;
}

/** Reflects a vector in the plane across `mirror`, from one row on. */
function reflect(mirror: Float64Array, twoOverSquare: number, vector: Float64Array, from: number): void {
	const factor = twoOverSquare * dot(mirror, vector, from);
	for (let k = from; k < vector.length; k++) vector[k]! -= factor * mirror[k]!;
}

/**
 * Turns a matrix into a triangle by Householder's reflections, and the right-hand side with it.
 *
 *     Q A = R,  Q b
 *
 * @param matrix columns, each at least as long as there are columns; left as they are
 * @param rightSide as long as a column; left as it is
 * @returns R and the part of Qb beside it
 * Validity: any real matrix at least as high as wide; a column without length leaves a zero on the diagonal.
 * Source: Golub and Van Loan, Matrix Computations, 4th ed., algorithm 5.2.1.
 * @example
 * triangularise([Float64Array.of(3, 4)], Float64Array.of(3, 4)).qb[0]; // -5
 */
export function triangularise(matrix: Columns, rightSide: Float64Array): Triangle {
	const r = matrix.map((column) => Float64Array.from(column));
	const b = Float64Array.from(rightSide);
	for (let j = 0; j < r.length; j++) {
		const column = r[j]!;
		const length = Math.sqrt(dot(column, column, j));
		if (length === 0) continue;
		const diagonal = column[j]! > 0 ? -length : length;
		const mirror = Float64Array.from(column);
		mirror[j]! -= diagonal;
		const twoOverSquare = 2 / dot(mirror, mirror, j);
		for (let other = j; other < r.length; other++) reflect(mirror, twoOverSquare, r[other]!, j);
		reflect(mirror, twoOverSquare, b, j);
	}
	return { r, qb: b.slice(0, r.length) };
}

/** Solves R x = b, from the last row up; null where the diagonal has a zero. */
export function solveUpper({ r, qb }: Triangle): Float64Array | null {
	const x = Float64Array.from(qb);
	for (let j = r.length - 1; j >= 0; j--) {
		if (r[j]![j] === 0) return null;
		x[j]! /= r[j]![j]!;
		for (let row = 0; row < j; row++) x[row]! -= x[j]! * r[j]![row]!;
	}
	return x;
}

/** Solves Rᵀ x = b, from the first row down; the diagonal must have no zero. */
export function solveLower(r: Columns, b: Float64Array): Float64Array {
	const x = Float64Array.from(b);
	for (let j = 0; j < r.length; j++) {
		for (let row = 0; row < j; row++) x[j]! -= r[j]![row]! * x[row]!;
		x[j]! /= r[j]![j]!;
	}
	return x;
}

export function sumOfSquares(vector: Float64Array): number {
	return dot(vector, vector, 0);
}

export function norm(vector: Float64Array): number {
	return Math.sqrt(sumOfSquares(vector));
}
