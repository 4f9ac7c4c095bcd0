import { describe, expect, it } from 'vitest';
import { ambientTempC, sunWPerM2 } from '../../src/lib/thermal';
import { readTable } from './support/reference-data';

const profile = readTable('design-day-profile/profile.csv').map((row) => ({
	hour: Number(row.clockHour),
	fraction: Number(row.fractionOfDailyRange)
}));
const DAY = { tMax: 40, dailyRange: 14 };

describe('the design day (ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6)', () => {
	it.each(profile.map(({ hour, fraction }) => [hour, fraction]))(
		'is at hour %i by %f of the range cooler',
		(hour, fraction) => {
			expect(ambientTempC(hour, DAY)).toBeCloseTo(40 - 14 * fraction, 12);
		}
	);

	it.each(
		readTable('design-day-profile/worked-day.csv').map((row) => [Number(row.clockHour), Number(row.dryBulbC)])
	)('has at hour %i the worked %f °C', (hour, dryBulbC) => {
		expect(ambientTempC(hour, DAY)).toBeCloseTo(dryBulbC, 2);
	});

	it('sums its fractions to 12.87 and averages 32.4925 °C on the worked day', () => {
		expect(profile).toHaveLength(24);
		expect(profile.reduce((sum, { fraction }) => sum + fraction, 0)).toBeCloseTo(12.87, 10);
		expect(profile.reduce((sum, { hour }) => sum + ambientTempC(hour, DAY), 0) / 24).toBeCloseTo(32.4925, 10);
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
