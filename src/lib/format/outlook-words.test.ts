import { describe, expect, it } from 'vitest';
import { compareDays } from './outlook-words';

const days = (middle: number, high = 30) => ({ low: 0, middle, high });

describe('a count of days beside the one before', () => {
	it.each([
		['more', 4, 9],
		['fewer', 9, 4],
		['alike', 9, 9.2],
		['alike', 0, 0]
	] as const)('is %s: %d, then %d', (change, was, is) => {
		expect(compareDays(days(was), days(is))).toBe(change);
	});

	it('is alike where both are shown alike, however far apart they are', () => {
		expect(compareDays(days(0.4, 0.4), days(0.1, 0.1))).toBe('alike');
	});
});
