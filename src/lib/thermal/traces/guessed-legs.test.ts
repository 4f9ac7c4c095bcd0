import { describe, expect, it } from 'vitest';
import { minutesTrace, noiseAt } from '../../../../tests/support/trace-files';
import { proposeLegs } from './propose-legs';

describe('legs from temperatures alone', () => {
	const airC = Array.from({ length: 480 }, (_, minute) => 20 + minute / 30);
	/** Above the air: parked, driven for 150 minutes, and parked again, where the engine first warms the bay once more. */
	const excessK: number[] = [];
	for (let minute = 0; minute < 480; minute++) {
		const before = excessK.at(-1) ?? 0;
		const [towards, within] =
			minute < 90 ? [0, 10] : minute < 240 ? [18, 10] : minute < 250 ? [40, 12] : [0, 60];
		excessK.push(before + (towards - before) / within);
	}
	const bayAirC = airC.map((air, at) => air + excessK[at]! + 0.3 * noiseAt(at));

	it('are guessed, and say so: counted from the outside air, what warms with the day is no drive', () => {
		const legs = proposeLegs(minutesTrace({ ambientC: airC, bayAirC }));
		expect(legs.map(({ kind }) => kind)).toEqual(['stopped', 'driving', 'stopped']);
		expect(Math.abs(legs[0]!.endS / 60 - 90)).toBeLessThanOrEqual(5);
		expect(Math.abs(legs[1]!.endS / 60 - 240)).toBeLessThanOrEqual(15);
		for (const { why } of legs) expect(why).toMatch(/^a guess: bay air .* over the outside air$/);
	});

	it('are one where nothing rises by more than the sun alone makes', () => {
		const sunny = airC.map((air, at) => air + 5 * Math.sin((Math.PI * at) / 480));
		expect(proposeLegs(minutesTrace({ ambientC: airC, bayAirC: sunny }))).toMatchObject([
			{ kind: 'stopped', why: 'no charge, and no temperature tells' }
		]);
	});
});
