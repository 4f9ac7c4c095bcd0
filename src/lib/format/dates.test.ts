import { describe, expect, it } from 'vitest';
import { formatDate, formatShortDate, sayMonth } from './dates';

describe('a day without a time', () => {
	it.each(['America/Los_Angeles', 'Australia/Darwin', 'UTC'])('is that day for a reader in %s', (zone) => {
		expect(formatDate('2026-12-02', zone)).toBe('2 December 2026');
		expect(formatShortDate('2026-12-02', zone)).toBe('2 Dec 2026');
	});

	it('is another day there when it is a moment', () => {
		expect(formatDate('2026-12-02T02:00:00Z', 'America/Los_Angeles')).toBe('1 December 2026');
		expect(formatDate('2026-12-02T20:00:00Z', 'Australia/Darwin')).toBe('3 December 2026');
	});
});

describe('a month', () => {
	it('is said shortly', () => {
		expect(sayMonth('2026-03')).toBe('Mar 2026');
	});
});
