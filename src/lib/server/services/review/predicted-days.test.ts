import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	daysInMonth,
	listMonths,
	monthsBefore,
	predictInMonth,
	predictUntil,
	type Cohort
} from './predicted-days';

/** All in the southern summer: 3.1 days in January, 2.8 in February, none from March on. */
const SUMMER: Cohort = {
	month: '2025-01',
	// Fitted on the 11th: 21 of 31 days are left.
	firstMonthDays: 2.1,
	monthDays: [3.1, 2.8, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0]
};

const months = fc.integer({ min: 0, max: 240 }).map((count) => monthsBefore('2030-12', count));
const cohorts = fc
	.record({
		month: months,
		share: fc.double({ min: 0.03, max: 1, noNaN: true }),
		monthDays: fc.array(fc.double({ min: 0, max: 20, noNaN: true }), { minLength: 12, maxLength: 12 })
	})
	.map(({ month, share, monthDays }): Cohort => {
		const firstMonthDays = monthDays[Number(month.slice(5)) - 1]! * share;
		return { month, firstMonthDays, monthDays };
	});

describe('dark days predicted of a cohort', () => {
	it('go by the season: a winter adds nothing', () => {
		expect(predictUntil(SUMMER, '2025-02-28')).toBeCloseTo(4.9, 9);
		expect(predictUntil(SUMMER, '2025-12-31')).toBeCloseTo(4.9, 9);
		expect(predictUntil(SUMMER, '2026-03-01')).toBeCloseTo(4.9 + 5.9, 9);
		expect(predictUntil(SUMMER, '2028-02-29')).toBeCloseTo(4.9 + 3 * 5.9, 9);
	});

	it('count the month of today as far as it has gone by', () => {
		expect(predictInMonth(SUMMER, '2026-01', '2026-01-10')).toBeCloseTo(1, 9);
		expect(predictUntil(SUMMER, '2026-01-10')).toBeCloseTo(5.9, 9);
		// In the month of fitting, from the 11th to the 20th.
		expect(predictUntil(SUMMER, '2025-01-20')).toBeCloseTo(1, 9);
	});

	it('are none before the first day', () => {
		expect(predictUntil(SUMMER, '2024-12-31')).toBe(0);
		expect(predictInMonth(SUMMER, '2024-12', '2026-01-10')).toBe(0);
		expect(predictInMonth(SUMMER, '2026-02', '2026-01-10')).toBe(0);
	});

	it('are the sum of their months, whenever fitted and whenever asked', () => {
		fc.assert(
			fc.property(cohorts, months, fc.integer({ min: 1, max: 28 }), (cohort, month, day) => {
				const today = `${month}-${String(day).padStart(2, '0')}`;
				const byMonth = listMonths(cohort.month, month).map((each) => predictInMonth(cohort, each, today));
				const sum = byMonth.reduce((total, days) => total + days, 0);
				expect(predictUntil(cohort, today)).toBeCloseTo(sum, 6);
			})
		);
	});
});

describe('months', () => {
	it('run over the ends of years', () => {
		expect(listMonths('2025-11', '2026-02')).toEqual(['2025-11', '2025-12', '2026-01', '2026-02']);
		expect(listMonths('2026-02', '2025-11')).toEqual([]);
		expect(monthsBefore('2026-01', 13)).toBe('2024-12');
	});

	it('have their days, in leap years too', () => {
		expect(daysInMonth('2028-02-03')).toBe(29);
		expect(daysInMonth('2026-02-03')).toBe(28);
		expect(daysInMonth('2026-12-31')).toBe(31);
	});
});
