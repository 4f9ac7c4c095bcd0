import { describe, expect, it } from 'vitest';
import { finishWork } from '../thermal/uncertainty/finish-work';
import { runSpread } from './run-spread';
import { DEFAULT_SAMPLE } from './testing/sample-inputs';

describe('the spread around a surveyed day', () => {
	it('is drawn to its end, the same each time, and moves with what is surveyed', () => {
		const inputs = DEFAULT_SAMPLE;
		const spread = finishWork(runSpread(inputs));
		expect(finishWork(runSpread(inputs))).toEqual(spread);
		expect(spread.band.lowC.length).toBe(spread.band.highC.length);
		const cooler = { ...inputs, hotDay: { ...inputs.hotDay, hotDayMaxC: inputs.hotDay.hotDayMaxC - 10 } };
		expect(Math.max(...finishWork(runSpread(cooler)).band.middleC)).toBeLessThan(
			Math.max(...spread.band.middleC)
		);
	});
});
