import { describe, expect, it } from 'vitest';
import { estimateMonths } from '../../src/lib/thermal/weather';
import { readTable } from './support/reference-data';

const MONTHS = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
/** What the estimate puts between its hot day and the mean of its hottest month. */
const HOT_DAY_ABOVE_MEAN_K = 7;

interface Deviation {
	station: string;
	/** Half the way from the hottest month to the coolest, estimated less published. */
	seasonK: number;
	monthsK: number[];
}

/**
 * The stations publish means of the whole day, and the estimate is of the daily highest: what is compared is the season,
 * with both set equal in the hottest month.
 */
const deviations: Deviation[] = readTable('climate/stations.csv').map((row) => {
	const published = MONTHS.map((month) => Number(row[`meanC${month}`]));
	const hotDayMaxC = Math.max(...published) + HOT_DAY_ABOVE_MEAN_K;
	const months = estimateMonths({ latitudeDeg: Number(row.latitudeDeg), hotDayMaxC });
	const estimated = months.map(({ meanMaxC }) => meanMaxC);
	const swing = (values: readonly number[]): number => (Math.max(...values) - Math.min(...values)) / 2;
	return {
		station: row.station!,
		seasonK: swing(estimated) - swing(published),
		monthsK: estimated.map((value, month) => value - published[month]!)
	};
});

const rootMeanSquare = (values: readonly number[]): number =>
	Math.sqrt(values.reduce((sum, value) => sum + value * value, 0) / values.length);
const largest = (values: readonly number[]): number => Math.max(...values.map(Math.abs));

describe('months estimated from latitude alone, beside ten stations', () => {
	it('has ten stations, from the equator to 56° north', () => {
		expect(deviations).toHaveLength(10);
	});

	it('are off in the season by 2 K in the root mean square, and by 3.5 K at most', () => {
		const seasonsK = deviations.map(({ seasonK }) => seasonK);
		expect(rootMeanSquare(seasonsK)).toBeLessThan(2);
		expect(largest(seasonsK)).toBeLessThan(3.5);
	});

	it('are off in a month by 2.6 K in the root mean square, and by 7.1 K at most', () => {
		const monthsK = deviations.flatMap((each) => each.monthsK);
		expect(rootMeanSquare(monthsK)).toBeLessThan(2.6);
		expect(largest(monthsK)).toBeLessThan(7.1);
	});

	it('put the summer on the right side of the year, but under the monsoon and at the equator', () => {
		const early = readTable('climate/stations.csv').flatMap((row) => {
			const published = MONTHS.map((month) => Number(row[`meanC${month}`]));
			const hottest = published.indexOf(Math.max(...published));
			const expected = Number(row.latitudeDeg) < 0 ? 0 : 6;
			const monthsApart = Math.min((hottest - expected + 12) % 12, (expected - hottest + 12) % 12);
			return monthsApart > 1 ? [row.station] : [];
		});
		expect(early).toEqual(['Singapore', 'New Delhi']);
	});
});
