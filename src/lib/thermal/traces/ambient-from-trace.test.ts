import { describe, expect, it } from 'vitest';
import { minutesTrace, noiseAt } from '../../../../tests/support/trace-files';
import { ambientTempC } from '../vehicle/climate';
import { ambientFromTrace } from './ambient-from-trace';

describe('the air of a trace', () => {
	const climate = { tMax: 39, dailyRange: 16 };
	const airFrom = (fromHour: number, hours: number, noiseK = 0) =>
		Array.from(
			{ length: hours * 60 },
			(_, minute) => ambientTempC(fromHour + (minute + 0.5) / 60, climate) + noiseK * noiseAt(minute)
		);

	it('gives the design day that it is of, from six hours of a morning already', () => {
		for (const [fromHour, hours] of [
			[0, 24],
			[6, 6]
		] as const) {
			const measured = ambientFromTrace(
				minutesTrace({ ambientC: airFrom(fromHour, hours) }, { startS: fromHour * 3600 })
			)!;
			expect(measured.climate!.tMax).toBeCloseTo(39, 4);
			expect(measured.climate!.dailyRange).toBeCloseTo(16, 4);
			expect(measured.offByK).toBeLessThan(1e-4);
			expect([measured.startHour, measured.tempC.length]).toEqual([fromHour, hours * 60]);
		}
	});

	it('says how far it lies from that day', () => {
		const { offByK, climate: found } = ambientFromTrace(minutesTrace({ ambientC: airFrom(0, 24, 1) }))!;
		expect(offByK).toBeCloseTo(1 / Math.sqrt(3), 1);
		expect(found!.tMax).toBeCloseTo(39, 0);
	});

	it('passes over what was not measured', () => {
		const holes = airFrom(0, 24).map((tempC, minute) => (minute % 100 < 30 ? NaN : tempC));
		const measured = ambientFromTrace(minutesTrace({ ambientC: holes }))!;
		expect(measured.climate!.dailyRange).toBeCloseTo(16, 4);
		expect(measured.tempC[0]).toBeNaN();
	});

	it('gives no day from two hours, from an air that cools towards noon, or without an hour', () => {
		expect(ambientFromTrace(minutesTrace({ ambientC: airFrom(13, 2) }, { startS: 13 * 3600 }))).toMatchObject(
			{ climate: null, whyNone: 'too-little' }
		);
		const falling = Array.from({ length: 8 * 60 }, (_, minute) => 40 - minute / 60);
		expect(ambientFromTrace(minutesTrace({ ambientC: falling }, { startS: 6 * 3600 }))).toMatchObject({
			climate: null,
			whyNone: 'unlike-a-day'
		});
		const elapsed = minutesTrace({ ambientC: airFrom(0, 24) }, { timeBase: 'elapsed' });
		expect(ambientFromTrace(elapsed)).toMatchObject({ startHour: null, climate: null, whyNone: 'no-hour' });
		expect(ambientFromTrace(elapsed, 0)!.climate!.tMax).toBeCloseTo(39, 4);
		expect(ambientFromTrace(elapsed, 0)!.whyNone).toBeNull();
	});

	it('is nobody’s where the trace has none', () => {
		expect(ambientFromTrace(minutesTrace({ cellC: [1, 2] }))).toBeNull();
	});
});
