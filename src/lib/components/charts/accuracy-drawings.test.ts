import { describe, expect, it } from 'vitest';
import type { ChanceBin } from '../../schemas/accuracy';
import { CALIBRATION_BOX, drawCalibration } from './calibration-drawing';
import { drawErrorSteps, STEPS_BOX } from './error-steps';

const bin = (statedShare: number | null, value: number | null, installations: number): ChanceBin => ({
	...{ from: 0, to: 1, installations, wentDark: 0, statedShare },
	observedShare:
		value === null ? null : { value, low: Math.max(value - 0.2, 0), high: Math.min(value + 0.1, 1) }
});

describe('stated chances against what happened', () => {
	it('put what was right on the line, and what was not beside it', () => {
		const { points, perfect } = drawCalibration([bin(0.5, 0.5, 20), bin(0.5, 0.9, 20)]);
		const [x0, y0, x1, y1] = [...perfect.matchAll(/[\d.]+/g)].map(Number);
		const onLine = (x: number): number => y0! + ((x - x0!) / (x1! - x0!)) * (y1! - y0!);
		expect(points[0]!.y).toBeCloseTo(onLine(points[0]!.x), 0);
		expect(points[1]!.y).toBeLessThan(onLine(points[1]!.x) - 50);
	});

	it('draw the interval around each mark and nothing off the picture, larger for more installations', () => {
		const { points } = drawCalibration([bin(0, 0, 5), bin(0.4, 0.3, 20), bin(1, 1, 500)]);
		expect(points.map(({ count }) => count)).toEqual([5, 20, 500]);
		for (const { x, y, lowY, highY, radius } of points) {
			expect(highY).toBeLessThanOrEqual(y);
			expect(lowY).toBeGreaterThanOrEqual(y);
			expect(x - radius).toBeGreaterThan(0);
			expect(x + radius).toBeLessThan(CALIBRATION_BOX.width);
			expect(highY).toBeGreaterThan(0);
			expect(lowY).toBeLessThan(CALIBRATION_BOX.height);
		}
		expect(points[2]!.radius).toBeGreaterThan(points[0]!.radius);
	});

	it('draw no mark where there are too few to tell', () => {
		expect(drawCalibration([bin(0.4, null, 4), bin(null, null, 0)]).points).toEqual([]);
	});
});

describe('errors in steps', () => {
	const steps = [0, 3, 40, 1].map((readings, at) => ({ fromK: (at - 2) * 2, toK: (at - 1) * 2, readings }));

	it('stand side by side on one foot, as high as there are readings', () => {
		const { bars, zeroX, yTicks } = drawErrorSteps(steps);
		const foot = STEPS_BOX.height - STEPS_BOX.bottom;
		for (const { y, height } of bars) expect(y + height).toBeCloseTo(foot, 0);
		expect(bars[2]!.height / bars[1]!.height).toBeCloseTo(40 / 3, 0);
		expect(bars[1]!.x + bars[1]!.width).toBeLessThan(zeroX);
		expect(bars[2]!.x).toBeGreaterThan(zeroX);
		expect(yTicks.at(-1)!.readings).toBeGreaterThanOrEqual(40);
		expect(yTicks.length).toBeLessThanOrEqual(5);
	});

	it('leave room for the words of the outermost numbers on either side', () => {
		const { xTicks } = drawErrorSteps(
			Array.from({ length: 20 }, (_, at) => ({ fromK: at * 2 - 20, toK: at * 2 - 18, readings: at }))
		);
		/** Eight pixels a letter is more than any of "+20" takes at the size of the picture's words. */
		const half = ('+20'.length * 8) / 2;
		expect(xTicks[0]!.x).toBeGreaterThanOrEqual(half);
		expect(xTicks.at(-1)!.kelvin).toBe(20);
		expect(xTicks.at(-1)!.x).toBeLessThanOrEqual(STEPS_BOX.width - half);
	});

	it('have round numbers beneath, and a picture also of nothing', () => {
		expect(drawErrorSteps(steps).xTicks.map(({ kelvin }) => kelvin)).toContain(0);
		const { bars } = drawErrorSteps(steps.map((step) => ({ ...step, readings: 0 })));
		expect(bars.every(({ height }) => height === 0)).toBe(true);
	});
});
