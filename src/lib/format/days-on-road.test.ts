import { describe, expect, it } from 'vitest';
import { sayDaysOnRoad } from './days-on-road';

describe('days on the road', () => {
	it('that are alike are said once', () => {
		expect(sayDaysOnRoad(Array<number>(12).fill(4))).toBe('4 days each month');
		expect(sayDaysOnRoad(Array<number>(12).fill(1))).toBe('1 day each month');
		expect(sayDaysOnRoad(Array<number>(12).fill(0))).toBe('0 days each month');
	});

	it('that differ are summed and said by the months that have any', () => {
		expect(sayDaysOnRoad([12, 0, 0, 0, 0, 0, 3, 0, 0, 0, 0, 0])).toBe('15 days a year: Jan 12, Jul 3');
		expect(sayDaysOnRoad([0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1])).toBe('1 day a year: Dec 1');
	});
});
