import { describe, expect, it } from 'vitest';
import { coefficientDefaults, findContradictions, parseScenario } from '../index';

const pathsOf = (coefficients: Record<string, Record<string, number>>) =>
	findContradictions(coefficients).map(({ path, against }) => [path, against]);

describe('coefficients that cannot be true together', () => {
	it('are none in the thermal model’s own', () => {
		expect(findContradictions(coefficientDefaults())).toEqual([]);
	});

	it('are all told, each with the value, the limit and the other field', () => {
		expect(findContradictions({ engine: { thermostatOpen: 99 }, exhaust: { gasIdle: 800 } })).toEqual([
			{
				code: 'inconsistent',
				path: 'engine.thermostatFull',
				against: 'engine.thermostatOpen',
				value: 95,
				limit: 'above engine.thermostatOpen, 99 °C'
			},
			{
				code: 'inconsistent',
				path: 'exhaust.gasFull',
				against: 'exhaust.gasIdle',
				value: 760,
				limit: 'not below exhaust.gasIdle, 800 °C'
			}
		]);
		expect(pathsOf({ shield: { area: 0.3 } })).toEqual([['shield.area', 'battery.caseArea']]);
		expect(pathsOf({ battery: { caseArea: 0.05 } })).toEqual([['battery.topArea', 'battery.caseArea']]);
	});

	it('are the same that a scenario is refused for', () => {
		const coefficients = { engine: { thermostatOpen: 99 } };
		const [first] = findContradictions(coefficients);
		const parse = () => parseScenario({ ...coefficients, legs: [{ minutes: 60 }] });
		expect(parse).toThrow(`${first!.path} is 95: it must be ${first!.limit}.`);
	});
});
