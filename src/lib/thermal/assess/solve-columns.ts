/**
 * Solves A X = B for all columns of B at once, by elimination with row exchange; A and B are overwritten.
 *
 * Only for the small, diagonally heavy matrices of the ledger (five rows).
 */
export function solveColumns(matrix: Float64Array[], right: Float64Array[]): Float64Array[] {
	const size = matrix.length;
	for (let pivot = 0; pivot < size; pivot++) {
		exchangeRows(matrix, right, pivot);
		for (let row = pivot + 1; row < size; row++) {
			const factor = matrix[row]![pivot]! / matrix[pivot]![pivot]!;
			if (factor === 0) continue;
			subtractRow(matrix[row]!, matrix[pivot]!, factor, pivot);
			subtractRow(right[row]!, right[pivot]!, factor, 0);
		}
	}
	for (let row = size - 1; row >= 0; row--) {
		for (let other = row + 1; other < size; other++) {
			subtractRow(right[row]!, right[other]!, matrix[row]![other]!, 0);
		}
		const pivot = matrix[row]![row]!;
		right[row]!.forEach((value, column) => (right[row]![column] = value / pivot));
	}
	return right;
}

function exchangeRows(matrix: Float64Array[], right: Float64Array[], pivot: number): void {
	let best = pivot;
	for (let row = pivot + 1; row < matrix.length; row++) {
		if (Math.abs(matrix[row]![pivot]!) > Math.abs(matrix[best]![pivot]!)) best = row;
	}
	[matrix[pivot], matrix[best]] = [matrix[best]!, matrix[pivot]!];
	[right[pivot], right[best]] = [right[best]!, right[pivot]!];
}

function subtractRow(from: Float64Array, row: Float64Array, factor: number, start: number): void {
	for (let column = start; column < from.length; column++) from[column]! -= factor * row[column]!;
}
