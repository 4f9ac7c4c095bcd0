import { describe, expect, it } from 'vitest';
import { drawResiduals, RESIDUAL_BOX } from './residual-drawing';

const SERIES = { x: [0, 1, 2, 3], before: [4, 3, null, 2], after: [0.5, -0.5, null, 0] };

describe('residuals', () => {
	it('stand over one scale that holds zero, before farther from it than after', () => {
		const { yTicks, dots } = drawResiduals(SERIES);
		const zero = yTicks.find(({ isZero }) => isZero)!;
		expect(dots).toHaveLength(3);
		for (const { y } of dots) expect(Math.abs(y - zero.y)).toBeLessThan(25);
		expect(Math.min(...yTicks.map(({ y }) => y))).toBeGreaterThanOrEqual(RESIDUAL_BOX.top);
	});

	it('are broken where nothing was measured', () => {
		const { before, after } = drawResiduals(SERIES);
		expect([before.match(/M/g)?.length, after.match(/M/g)?.length]).toEqual([2, 2]);
	});

	it('can be drawn where there is hardly one', () => {
		const { xTicks } = drawResiduals({ x: [2], before: [null], after: [0] });
		expect(xTicks.length).toBeGreaterThan(0);
	});
});
