import { describe, expect, it } from 'vitest';
import {
	countVerdict,
	formatDays,
	formatRatioRange,
	listToSeeTo,
	sayApart,
	sayDarkDays,
	sayMonths,
	sayRatio,
	sayUncounted
} from './review-words';

describe('a ratio of reported to predicted', () => {
	it('is said with its range, and judged by it alone', () => {
		expect(formatRatioRange({ value: 0.8234, low: 0.4, high: 1.514 })).toBe('0.82 (0.40 to 1.51)');
		expect(sayRatio({ value: 2, low: 1.1, high: 3 })).toBe('more went dark than was predicted');
		expect(sayRatio({ value: 0.2, low: 0.1, high: 0.9 })).toContain('or not all was reported');
		expect(sayRatio({ value: 2, low: 0.9, high: 5 })).toContain('chance');
		expect(sayRatio(null)).toBe('nothing to hold it against');
	});

	it('says what is left out of it, and only that', () => {
		const figures = {
			chance: { known: 3, unknown: 1, never: 2 },
			reportedElsewhere: 0,
			notHeatDays: 1
		} as Parameters<typeof sayApart>[0];
		expect(sayApart(figures)).toHaveLength(3);
		expect(sayApart(figures)[0]).toMatch(/^Of 1 installation the chance is not known/);
		expect(sayApart(figures)[1]).toMatch(/^2 installations have a battery that nothing switches off/);
		expect(sayApart({ ...figures, chance: { known: 3, unknown: 0, never: 0 }, notHeatDays: 0 })).toEqual([]);
	});

	it.each([
		[{ known: 2, unknown: 0, never: 0 }, '1.3, 2', ''],
		[{ known: 2, unknown: 3, never: 0 }, '1.3, 2', 'not known for 3'],
		[{ known: 0, unknown: 2, never: 1 }, 'not known', 'not known for 2, no BMS for 1'],
		[{ known: 0, unknown: 0, never: 4 }, 'no BMS', 'no BMS for 4']
	])('takes nothing that is not known for a zero: %j', (chance, words, uncounted) => {
		expect(sayDarkDays({ chance, predictedDays: 1.3, reportedDays: 2 })).toBe(words);
		expect(sayUncounted({ chance })).toBe(uncounted);
	});

	it('counts verdicts as one speaks', () => {
		expect(countVerdict('cuts-out', 1)).toBe('1 cuts out');
		expect(countVerdict('rides-it-out', 3)).toBe('3 ride it out');
	});

	it('lists what is to be seen to, and leaves out what is not', () => {
		expect(listToSeeTo({ overdue: 2, overrides: 1, sheetsWaiting: 3 })).toEqual([
			'2 overdue',
			'1 override',
			'3 sheets not acknowledged'
		]);
		expect(listToSeeTo({ overdue: 0, overrides: 0, sheetsWaiting: 1 })).toEqual(['1 sheet not acknowledged']);
		expect(listToSeeTo({ overdue: 0, overrides: 0, sheetsWaiting: 0 })).toEqual([]);
	});

	it('says of the months what holds of what is shown', () => {
		const sums = { fitted: 8, predicted: 6.4, reported: 2 };
		expect(sayMonths({ ...sums, isNarrowed: false })).toBe(
			'In these 24 months 8 installations were fitted; of all that is fitted, 6.4 dark days were predicted and 2 reported.'
		);
		expect(sayMonths({ ...sums, fitted: 1, isNarrowed: true })).toBe(
			'In these 24 months 1 installation like that was fitted; of all installations like that, 6.4 dark days were predicted and 2 reported.'
		);
	});

	it('counts few days with a decimal', () => {
		expect(formatDays(3.14)).toBe('3.1');
		expect(formatDays(31.4)).toBe('31');
	});
});
