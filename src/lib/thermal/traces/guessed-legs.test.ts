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

	it('are the same where the bay rests a few kelvin above the outside air all night', () => {
		const night = Array.from({ length: 480 }, () => 20);
		const trace = minutesTrace({
			ambientC: [...night, ...airC],
			bayAirC: [...night.map((air, at) => air + 5 + 0.3 * noiseAt(at)), ...bayAirC.map((bay) => bay + 5)]
		});
		const legs = proposeLegs(trace);
		expect(legs.map(({ kind }) => kind)).toEqual(['stopped', 'driving', 'stopped']);
		expect(Math.abs(legs[0]!.endS / 60 - 570)).toBeLessThanOrEqual(5);
	});

	it('are one drive where the bay warms once and stays hot to the end', () => {
		const hot = airC.map((air, at) => air + Math.min(18, at / 2) + 0.3 * noiseAt(at));
		const kinds = proposeLegs(minutesTrace({ ambientC: airC, bayAirC: hot })).map(({ kind }) => kind);
		expect(kinds).toEqual(['driving']);
	});
});
