import { describe, expect, it } from 'vitest';
import { keepFilter, monthBack, reviewHref } from './review-query';

describe('the address of a page of the review', () => {
	it('says what is asked for and nothing else', () => {
		expect(reviewHref('/review', {})).toBe('/review');
		expect(reviewHref('/review', { kind: 'climate', verdict: undefined, since: '' })).toBe('/review');
		expect(reviewHref('/review/installations', { kind: 'own', zone: '3', list: 'overdue' })).toBe(
			'/review/installations?kind=own&zone=3&list=overdue'
		);
	});

	it('takes the filter along, not the place in a list', () => {
		const there = { kind: 'own', verdict: 'cuts-out', since: '2026-01', zone: '3', cursor: 'x' };
		expect(reviewHref('/review/map', keepFilter(there))).toBe(
			'/review/map?kind=own&verdict=cuts-out&since=2026-01'
		);
	});

	it('counts months back over the end of a year', () => {
		expect(monthBack('2026-02-28', 0)).toBe('2026-02');
		expect(monthBack('2026-02-28', 2)).toBe('2025-12');
		expect(monthBack('2026-12-31', 12)).toBe('2025-12');
	});
});
