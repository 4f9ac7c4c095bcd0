import { describe, expect, it } from 'vitest';
import { estimateMonths } from './estimate-months';

const meansOf = (latitudeDeg: number, hotDayMaxC: number): number[] =>
	estimateMonths({ latitudeDeg, hotDayMaxC }).map(({ meanMaxC }) => meanMaxC);

describe('months estimated from latitude and hot day', () => {
	it('are 35 °C in January and 22 °C in July at 25° south with a hot day of 42 °C', () => {
		const means = meansOf(-25, 42);
		expect(means).toHaveLength(12);
		expect(means[0]).toBeCloseTo(35, 9);
		expect(means[3]).toBeCloseTo(28.5, 9);
		expect(means[6]).toBeCloseTo(22, 9);
	});

	it('are half a year apart on both sides of the equator', () => {
		const south = meansOf(-40, 33);
		const north = meansOf(40, 33);
		south.forEach((meanC, month) => expect(north[(month + 6) % 12]).toBeCloseTo(meanC, 9));
	});

	it('put the hot day two spreads above the mean of the hottest month', () => {
		for (const latitudeDeg of [-35, 0, 51]) {
			const months = estimateMonths({ latitudeDeg, hotDayMaxC: 38 });
			const hottest = months.reduce((a, b) => (b.meanMaxC > a.meanMaxC ? b : a));
			expect(hottest.meanMaxC + 2 * hottest.spreadK).toBeCloseTo(38, 9);
		}
	});

	it('swing the more the further from the equator', () => {
		const swings = [0, 15, 30, 45, 60].map((latitudeDeg) => {
			const means = meansOf(latitudeDeg, 35);
			return Math.max(...means) - Math.min(...means);
		});
		expect(swings).toEqual([...swings].sort((a, b) => a - b));
		expect(swings[0]).toBeCloseTo(4, 9);
	});

	it('refuse a latitude and a hot day that cannot be', () => {
		expect(() => meansOf(91, 40)).toThrow('latitudeDeg is 91: it must be within -90 to 90.');
		expect(() => meansOf(-25, 61)).toThrow('hotDayMaxC is 61: it must be within -20 to 60.');
	});
});
