import { describe, expect, it } from 'vitest';
import { makeDays, makeEpw, makeHours, type SyntheticHour } from '../../../../tests/support/weather-files';
import { parseWeatherFile } from './parse-weather-file';
import { deriveWeatherFigures, type WeatherFigures } from './weather-figures';

function figuresOf(hours: readonly SyntheticHour[]): WeatherFigures {
	const parsed = parseWeatherFile(makeEpw(hours));
	if (!parsed.ok) throw new Error(parsed.problems[0]?.message);
	return deriveWeatherFigures(parsed.file.hours);
}

/** By sums of squares, from the days that the file was made of: another way than the one under test. */
function byHand(values: readonly number[]): { mean: number; spread: number } {
	const n = values.length;
	const sum = values.reduce((total, value) => total + value, 0);
	const squares = values.reduce((total, value) => total + value * value, 0);
	return { mean: sum / n, spread: Math.sqrt((squares - (sum * sum) / n) / (n - 1)) };
}

describe('the months of a weather file', () => {
	it('are the means and standard deviations of the daily highest', () => {
		const days = makeDays();
		const { monthlyMaxC, monthlySpreadK } = figuresOf(makeHours(days));
		for (let month = 1; month <= 12; month++) {
			const highest = days.filter((day) => day.month === month).map(({ highestC }) => highestC);
			const { mean, spread } = byHand(highest);
			expect(monthlyMaxC[month - 1]).toBeCloseTo(mean, 3);
			expect(monthlySpreadK[month - 1]).toBeCloseTo(spread, 3);
		}
	});

	it('of which every second day is 4 K hotter: 32 °C and 2 √(30/29) K in April', () => {
		const days = makeDays().map((day) => ({ ...day, highestC: day.day % 2 === 0 ? 34 : 30, lowestC: 20 }));
		const { monthlyMaxC, monthlySpreadK } = figuresOf(makeHours(days));
		expect(monthlyMaxC[3]).toBeCloseTo(32, 4);
		expect(monthlySpreadK[3]).toBeCloseTo(2.03419, 4);
	});
});

describe('the hot day of a weather file', () => {
	/** A level year but for some hours. */
	const withHotHours = (count: number) =>
		makeHours(makeDays()).map((hour, index) => ({ ...hour, dryBulbC: index < count ? 45 : 40 }));

	it('is what 0.4 % of the hours exceed: 35 of 8,760', () => {
		expect(figuresOf(withHotHours(35)).hotDayMaxC).toBe(40);
		expect(figuresOf(withHotHours(37)).hotDayMaxC).toBe(45);
		const between = figuresOf(withHotHours(36)).hotDayMaxC;
		expect(between).toBeGreaterThan(40);
		expect(between).toBeLessThan(45);
	});

	it.each([1, 7])('has the range and the sun of the hottest month, here month %i', (hottest) => {
		const figures = figuresOf(makeHours(makeDays(hottest)));
		expect(figures.hottestMonth).toBe(hottest - 1);
		expect(figures.dailyRangeK).toBeCloseTo(14, 4);
		expect(figures.sunPeakWPerM2).toBe(931);
	});

	it('has no sun where one hour of the hottest month is not known, and does not mind another month', () => {
		const unknownIn = (month: number) =>
			makeHours(makeDays()).map((hour) =>
				hour.month === month && hour.day === 3 && hour.hour === 0 ? { ...hour, sunWPerM2: 9_999 } : hour
			);
		expect(figuresOf(unknownIn(1)).sunPeakWPerM2).toBeNull();
		expect(figuresOf(unknownIn(6)).sunPeakWPerM2).toBe(931);
	});

	it('moves with the temperature, and its range does not', () => {
		const hours = makeHours(makeDays());
		const before = figuresOf(hours);
		const after = figuresOf(hours.map((hour) => ({ ...hour, dryBulbC: hour.dryBulbC + 3 })));
		expect(after.hotDayMaxC - before.hotDayMaxC).toBeCloseTo(3, 3);
		expect(after.dailyRangeK).toBeCloseTo(before.dailyRangeK, 3);
		expect(after.monthlySpreadK[0]).toBeCloseTo(before.monthlySpreadK[0]!, 3);
	});
});
