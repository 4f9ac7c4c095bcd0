import { describe, expect, it } from 'vitest';
import { ambientTempC, sunWPerM2 } from '../../src/lib/thermal';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { readTable } from './support/reference-data';

const profile = readTable('design-day-profile/profile.csv').map((row) => ({
	hour: Number(row.clockHour),
	fraction: Number(row.fractionOfDailyRange)
}));
const DAY = { tMax: 40, dailyRange: 14 };

const HANDBOOK: Omit<PublishedValue, 'name' | 'expected'> = {
	source: 'ASHRAE Handbook Fundamentals 2021',
	place: 'ch. 14, Table 6',
	standing: 'read in the source',
	unit: '',
	tolerance: { absolute: 1e-12 },
	because: 'a table value: only rounding'
};

describe('the design day against the handbook', () => {
	for (const { hour, fraction } of profile) {
		checkAgainst(
			{ ...HANDBOOK, name: `share of the daily range at hour ${hour}`, expected: fraction },
			() => {
				return (DAY.tMax - ambientTempC(hour, DAY)) / DAY.dailyRange;
			}
		);
	}

	const worked: Omit<PublishedValue, 'name' | 'expected'> = {
		...HANDBOOK,
		standing: 'worked from the published equation',
		unit: '°C',
		tolerance: { absolute: 0.005 },
		because: 'worked by hand to two decimals'
	};
	for (const row of readTable('design-day-profile/worked-day.csv')) {
		const hour = Number(row.clockHour);
		checkAgainst({ ...worked, name: `worked day at hour ${hour}`, expected: Number(row.dryBulbC) }, () =>
			ambientTempC(hour, DAY)
		);
	}
	const exact = { ...worked, tolerance: { absolute: 1e-10 }, because: 'an exact sum: only rounding' };
	const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
	checkAgainst({ ...exact, name: 'mean of the worked day', expected: 32.4925 }, () =>
		mean(profile.map(({ hour }) => ambientTempC(hour, DAY)))
	);
	checkAgainst({ ...exact, name: 'sum of the shares of a day', expected: 12.87, unit: '' }, () =>
		profile.reduce((sum, { hour }) => sum + (DAY.tMax - ambientTempC(hour, DAY)) / DAY.dailyRange, 0)
	);
});

describe('the design day', () => {
	it('has 24 hours in the table', () => {
		expect(profile.map(({ hour }) => hour)).toEqual(Array.from({ length: 24 }, (_, at) => at + 1));
	});

	it('is straight between the hours, and begins anew at midnight', () => {
		expect(ambientTempC(10.25, DAY)).toBeCloseTo(
			0.75 * ambientTempC(10, DAY) + 0.25 * ambientTempC(11, DAY),
			12
		);
		expect(ambientTempC(0, DAY)).toBe(ambientTempC(24, DAY));
		expect(ambientTempC(49.5, DAY)).toBeCloseTo(ambientTempC(1.5, DAY), 12);
	});
});

describe('the sun on the bonnet (engineering judgement, no source)', () => {
	it('peaks at noon, is down from six to six, and the same before and after noon', () => {
		expect(sunWPerM2(12, { sunPeak: 1000 })).toBe(1000);
		expect([0, 6, 18, 23, 30].map((hour) => sunWPerM2(hour, { sunPeak: 1000 }))).toEqual([0, 0, 0, 0, 0]);
		expect(sunWPerM2(9, { sunPeak: 1000 })).toBeCloseTo(sunWPerM2(15, { sunPeak: 1000 }), 9);
		// 1000 sin(45°)^1.2 = 659.75.
		expect(sunWPerM2(9, { sunPeak: 1000 })).toBeCloseTo(659.754, 3);
	});
});
