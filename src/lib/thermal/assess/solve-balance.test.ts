import { describe, expect, it } from 'vitest';
import { solveBalance } from './solve-balance';

describe('the balances of the ledger', () => {
	it('are solved', () => {
		// 4x + y = 6, x + 3y = 7: x = 1, y = 2.
		const right = Float64Array.of(6, 7);
		solveBalance(Float64Array.of(4, 1, 1, 3), right);
		expect(right[0]).toBeCloseTo(1, 12);
		expect(right[1]).toBeCloseTo(2, 12);
	});

	it('are solved where two rows have nothing to do with each other', () => {
		const right = Float64Array.of(6, 8, 9);
		solveBalance(Float64Array.of(2, 0, 0, 0, 4, 0, 0, 0, 3), right);
		expect([...right]).toEqual([3, 2, 3]);
	});
});
