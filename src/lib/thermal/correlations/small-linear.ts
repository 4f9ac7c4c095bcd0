import { EngineInputError } from './require';

/** Row at or below `from` with the largest entry in that column. */
function findPivot(rows: number[][], from: number): number {
	let best = from;
	for (let row = from + 1; row < rows.length; row++) {
		if (Math.abs(rows[row]![from]!) > Math.abs(rows[best]![from]!)) best = row;
	}
	return best;
}

/** Takes the column out of every row below the pivot's. */
function eliminate(rows: number[][], column: number): void {
	const pivot = rows[column]!;
	for (const row of rows.slice(column + 1)) {
		const share = row[column]! / pivot[column]!;
		for (let k = column; k < row.length; k++) row[k]! -= share * pivot[k]!;
	}
}

/**
 * Solves a small full system of linear equations by elimination with row exchange.
 *
 *     A x = b
 *
 * @param matrix A, square
 * @param rightSide b
 * @returns x
 * @throws EngineInputError when the equations do not determine x
 * Validity: a few equations; the pivot must not vanish against the largest entry of its row to sixteen digits.
 * Source: Golub and Van Loan, Matrix Computations, 3rd ed. 1996, algorithm 3.4.1.
 * @example
 * solveLinear([[2, 1], [1, 3]], [3, 5])[1]; // 1.4
 */
export function solveLinear(matrix: readonly (readonly number[])[], rightSide: readonly number[]): number[] {
	const rows = matrix.map((row, i) => [...row, rightSide[i]!]);
	const largest = Math.max(...matrix.flat().map(Math.abs));
	for (let column = 0; column < rows.length; column++) {
		const at = findPivot(rows, column);
		[rows[column], rows[at]] = [rows[at]!, rows[column]!];
		const pivot = rows[column]![column]!;
		if (!(Math.abs(pivot) > largest * 1e-16)) throw new EngineInputError('pivot', pivot, 'different from 0');
		eliminate(rows, column);
	}
	const solution = new Array<number>(rows.length).fill(0);
	for (let i = rows.length - 1; i >= 0; i--) {
		const row = rows[i]!;
		const known = solution.reduce((sum, x, k) => (k > i ? sum + row[k]! * x : sum), 0);
		solution[i] = (row[rows.length]! - known) / row[i]!;
	}
	return solution;
}
