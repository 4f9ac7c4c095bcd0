import { describe, expect, it } from 'vitest';
import { isEveningPattern } from './evening-pattern';
import { rankOtherCauses } from './other-causes';

const EVENING = { wentDarkHour: 17.5, cameBackHour: 20.5, withinHours: 0.5 };

describe('the evening of cells that were too hot', () => {
	it('is a hot day, dark from the late afternoon on, back by itself within hours', () => {
		expect(isEveningPattern(EVENING, 41)).toBe(true);
		expect(isEveningPattern({ ...EVENING, wentDarkHour: 21, cameBackHour: 25 }, 32)).toBe(true);
	});

	it.each([
		['a mild day', EVENING, 24],
		['a morning', { ...EVENING, wentDarkHour: 8, cameBackHour: 11 }, 41],
		['the small hours', { ...EVENING, wentDarkHour: 27, cameBackHour: 29 }, 41],
		['one that did not come back by itself', { ...EVENING, cameBackHour: null }, 41],
		['one that came back at once', { ...EVENING, cameBackHour: 17.6 }, 41],
		['one that stayed dark into the next day', { ...EVENING, cameBackHour: 32 }, 41]
	])('is not %s', (_, report, hottestDayC) => {
		expect(isEveningPattern(report, hottestDayC)).toBe(false);
	});

	it('has cells too cold to be charged as the last of other causes, whatever else holds', () => {
		for (const soc of [0.05, 0.5, 1])
			for (const currentA of [-40, 0, 40])
				for (const engineOn of [true, false]) {
					const moment = { soc, currentA, engineOn, capacityAh: 100, cellsC: 45, ambientC: 38, darkHours: 3 };
					expect(rankOtherCauses(moment).at(-1)!.key).toBe('cold');
				}
	});
});
