import { describe, expect, it } from 'vitest';
import { inventDarkDays, spreadOverYear } from './invent-dark-days';
import { listMonths } from './predicted-days';

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);

describe('a year of invented dark days', () => {
	it.each([true, false])(
		'has its height in the local summer and no month without any: south %s',
		(isSouth) => {
			const months = spreadOverYear(6, isSouth);
			expect(sum(months)).toBeCloseTo(6, 9);
			expect(months.indexOf(Math.max(...months))).toBe(isSouth ? 0 : 6);
			expect(Math.min(...months)).toBeGreaterThan(0);
		}
	);
});

describe('invented reports', () => {
	const MANY = 20_000;
	const fittedOn = '2025-03-11';
	const today = '2026-10-20';
	const monthDays = spreadOverYear(4, false);
	const invented = Array.from({ length: MANY }, (_, index) =>
		inventDarkDays({ seed: 3, index, fittedOn, today, monthDays })
	);

	it('agree with what is predicted, month by month', () => {
		const counts = new Map<string, number>();
		for (const { on } of invented.flat()) {
			const month = on.slice(0, 7);
			counts.set(month, (counts.get(month) ?? 0) + 1);
		}
		for (const month of listMonths('2025-03', '2026-10')) {
			const whole = monthDays[Number(month.slice(5)) - 1]!;
			// 21 of the 31 days of March were left, and 20 of the 31 of October have gone by.
			const share = { '2025-03': 21 / 31, '2026-10': 20 / 31 }[month] ?? 1;
			const expected = MANY * whole * share;
			// A count of chances has at most the spread of a Poisson count: five of them hardly ever come.
			expect(Math.abs((counts.get(month) ?? 0) - expected)).toBeLessThan(5 * Math.sqrt(expected) + 1);
		}
	});

	it('are days between the fitting and today, none of them twice', () => {
		expect(invented.some((days) => days.length > 1)).toBe(true);
		const isWrong = (days: { on: string }[]): boolean =>
			new Set(days.map(({ on }) => on)).size < days.length ||
			days.some(({ on }) => on < fittedOn || on > today || Number.isNaN(Date.parse(on)));
		expect(invented.filter(isWrong)).toEqual([]);
		const [first] = inventDarkDays({
			seed: 3,
			index: 1,
			fittedOn,
			today: fittedOn,
			monthDays: Array(12).fill(31)
		});
		expect(first?.on).toBe(fittedOn);
	});
});
