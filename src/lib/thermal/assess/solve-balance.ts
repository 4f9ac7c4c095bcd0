/**
 * Solves A x = b by elimination; `matrix` (row after row) is overwritten, and `right` becomes x.
 *
 * Only for the balances of the ledger (five rows): each row's diagonal outweighs the rest of it, so that no rows need
 * to change places.
 */
export function solveBalance(matrix: Float64Array, right: Float64Array): void {
	const size = right.length;
	for (let pivot = 0; pivot < size; pivot++) {
		for (let row = pivot + 1; row < size; row++) {
			const factor = matrix[row * size + pivot]! / matrix[pivot * size + pivot]!;
			if (factor === 0) continue;
			for (let column = pivot + 1; column < size; column++) {
				matrix[row * size + column]! -= factor * matrix[pivot * size + column]!;
			}
			right[row]! -= factor * right[pivot]!;
		}
	}
	for (let row = size - 1; row >= 0; row--) {
		let left = right[row]!;
		for (let column = row + 1; column < size; column++) left -= matrix[row * size + column]! * right[column]!;
		right[row] = left / matrix[row * size + row]!;
	}
}
