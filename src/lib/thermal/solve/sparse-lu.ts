/**
 * Gaussian elimination in an order fixed beforehand, without pivoting.
 *
 * Safe for the matrices C/(γh) − dH/dT of a thermal network: what one node gains another has given, so all
 * off-diagonal entries are at most zero and the diagonal outweighs them.
 */
export interface SparseLu {
	readonly size: number;
	/** For each pivot: row-major places to divide, then the products to take away. */
	readonly eliminations: Int32Array;
	/** Triples row, place, column of the lower triangle in order of use. */
	readonly forward: Int32Array;
	readonly backward: Int32Array;
	readonly order: Int32Array;
	readonly inversePivots: Float64Array;
}

/** Columns and rows that couple to a node among those not yet eliminated. */
function countFill(links: readonly boolean[][], node: number, left: ReadonlySet<number>): number {
	let rows = 0;
	let columns = 0;
	for (const other of left) {
		if (other === node) continue;
		if (links[other]![node]) rows++;
		if (links[node]![other]) columns++;
	}
	return rows * columns;
}

/**
 * Decides the order of elimination (least fill first) and writes down every operation.
 *
 * @param size number of unknowns
 * @param pattern [row, column] pairs that can be other than zero; the diagonal always is
 */
export function planSparseLu(size: number, pattern: readonly (readonly [number, number])[]): SparseLu {
	const links = Array.from({ length: size }, () => new Array<boolean>(size).fill(false));
	for (const [row, column] of pattern) links[row]![column] = true;
	const left = new Set(Array.from({ length: size }, (_, node) => node));
	const order: number[] = [];
	const eliminations: number[] = [];
	const forward: number[] = [];
	const upper: [number, number][] = [];
	while (left.size > 0) {
		const pivot = [...left].reduce((best, node) =>
			countFill(links, node, left) < countFill(links, best, left) ? node : best
		);
		left.delete(pivot);
		order.push(pivot);
		const columns = [...left].filter((column) => links[pivot]![column]);
		for (const column of columns) upper.push([pivot, column]);
		for (const row of left) {
			if (!links[row]![pivot]) continue;
			forward.push(row, row * size + pivot, pivot);
			eliminations.push(row * size + pivot, pivot, columns.length);
			for (const column of columns) {
				eliminations.push(row * size + column, pivot * size + column);
				links[row]![column] = true;
			}
		}
	}
	const backward: number[] = [];
	for (const pivot of [...order].reverse()) {
		for (const [row, column] of upper) if (row === pivot) backward.push(row, row * size + column, column);
	}
	return {
		size,
		eliminations: Int32Array.from(eliminations),
		forward: Int32Array.from(forward),
		backward: Int32Array.from(backward),
		order: Int32Array.from(order),
		inversePivots: new Float64Array(size)
	};
}

/** Factorises the matrix in place, row by row as planned; false when a pivot is zero or not finite. */
export function factorise(plan: SparseLu, matrix: Float64Array): boolean {
	const { size, eliminations, inversePivots, order } = plan;
	let at = 0;
	const end = eliminations.length;
	for (let step = 0; step < size; step++) {
		const pivot = order[step]!;
		const inverse = 1 / matrix[pivot * size + pivot]!;
		if (!(inverse > -Infinity && inverse < Infinity)) return false;
		inversePivots[pivot] = inverse;
		while (at < end && eliminations[at + 1] === pivot) {
			const place = eliminations[at]!;
			const count = eliminations[at + 2]!;
			at += 3;
			const factor = matrix[place]! * inverse;
			matrix[place] = factor;
			for (const stop = at + 2 * count; at < stop; at += 2) {
				const target = eliminations[at]!;
				matrix[target] = matrix[target]! - factor * matrix[eliminations[at + 1]!]!;
			}
		}
	}
	return true;
}

/** Solves with the factorised matrix; the right-hand side, which begins at `offset`, becomes the solution. */
export function solveFactorised(
	plan: SparseLu,
	matrix: Float64Array,
	vectors: Float64Array,
	offset = 0
): void {
	const { forward, backward, inversePivots, order, size } = plan;
	for (let at = 0; at < forward.length; at += 3) {
		const row = offset + forward[at]!;
		vectors[row] = vectors[row]! - matrix[forward[at + 1]!]! * vectors[offset + forward[at + 2]!]!;
	}
	let at = 0;
	for (let step = size - 1; step >= 0; step--) {
		const row = order[step]!;
		let value = vectors[offset + row]!;
		for (; at < backward.length && backward[at] === row; at += 3) {
			value -= matrix[backward[at + 1]!]! * vectors[offset + backward[at + 2]!]!;
		}
		vectors[offset + row] = value * inversePivots[row]!;
	}
}
