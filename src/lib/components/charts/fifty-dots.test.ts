import { describe, expect, it } from 'vitest';
import { DOT_COUNT, drawFiftyDots } from './fifty-dots';

const spreadOf = (middle: number, width: number): number[] =>
	Array.from({ length: DOT_COUNT }, (_, k) => middle + width * ((k + 0.5) / DOT_COUNT - 0.5));

describe('fifty dots against a limit', () => {
	it.each([
		['far below', spreadOf(50, 10), 75, 0],
		['far above', spreadOf(95, 10), 75, 50],
		['on both sides', spreadOf(75, 20), 75, 25],
		['all the same', spreadOf(60, 0), 75, 0]
	])('draws every one, %s, none over another and none off the picture', (_, values, limitC, beyond) => {
		const { dots, radius, width, height, baseY, limitX } = drawFiftyDots(values, limitC);
		expect(dots).toHaveLength(DOT_COUNT);
		expect(dots.filter(({ isBeyond }) => isBeyond)).toHaveLength(beyond);
		expect(new Set(dots.map(({ x, y }) => `${x} ${y}`)).size).toBe(DOT_COUNT);
		for (const { x, y, isBeyond } of dots) {
			expect(x - radius).toBeGreaterThanOrEqual(0);
			expect(x + radius).toBeLessThanOrEqual(width);
			expect(y - radius).toBeGreaterThanOrEqual(0);
			expect(y + radius).toBeLessThanOrEqual(baseY);
			expect(isBeyond ? x - radius >= limitX : x + radius <= limitX).toBe(true);
		}
		for (const [at, one] of dots.entries())
			for (const other of dots.slice(at + 1))
				expect(Math.hypot(one.x - other.x, one.y - other.y)).toBeGreaterThanOrEqual(2 * radius);
		expect(height).toBeLessThan(260);
	});

	it('puts hotter days further to the right, and a scale beneath with few round numbers', () => {
		const { dots, ticks } = drawFiftyDots(spreadOf(70, 30), 75);
		const beyond = dots.filter(({ isBeyond }) => isBeyond).map(({ x }) => x);
		const within = dots.filter(({ isBeyond }) => !isBeyond).map(({ x }) => x);
		expect(Math.max(...within)).toBeLessThan(Math.min(...beyond));
		expect(beyond.length).toBe(spreadOf(70, 30).filter((tempC) => tempC >= 75).length);
		expect(ticks.length).toBeGreaterThan(2);
		expect(ticks.length).toBeLessThan(8);
		expect(ticks.every(({ tempC }) => tempC % 5 === 0)).toBe(true);
	});
});
