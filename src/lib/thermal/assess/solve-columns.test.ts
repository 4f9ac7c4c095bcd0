import { describe, expect, it } from 'vitest';
import { solveColumns } from './solve-columns';

const rows = (values: number[][]) => values.map((row) => Float64Array.from(row));

describe('small systems of equations', () => {
	it('are solved for all right sides at once', () => {
		// x + 2y = 5, 3x + 4y = 11: x = 1, y = 2; doubled in the second column.
		const solution = solveColumns(
			rows([
				[1, 2],
				[3, 4]
			]),
			rows([
				[5, 10],
				[11, 22]
			])
		);
		expect(solution[0]![0]).toBeCloseTo(1, 12);
		expect(solution[1]![0]).toBeCloseTo(2, 12);
		expect(solution[0]![1]).toBeCloseTo(2, 12);
		expect(solution[1]![1]).toBeCloseTo(4, 12);
	});

	it('are solved with a zero where elimination begins', () => {
		const solution = solveColumns(
			rows([
				[0, 2],
				[4, 0]
			]),
			rows([[6], [8]])
		);
		expect([solution[0]![0], solution[1]![0]]).toEqual([2, 3]);
	});
});
