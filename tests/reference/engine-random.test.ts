import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NODE_NAMES, SCENARIO_FIELDS, SENSORS, simulateScenario, SURFACES } from '../../src/lib/thermal';
import { ScenarioError } from '../../src/lib/thermal';

const real = (min: number, max: number) => fc.double({ min, max, noNaN: true, noDefaultInfinity: true });

const legs = fc.array(
	fc.record({
		minutes: real(0.5, 300),
		engineOn: fc.boolean(),
		speedKmh: real(0, 130),
		surface: fc.constantFrom(...SURFACES),
		gradePercent: real(-10, 15),
		towMassKg: real(0, 3500),
		bonnetOpen: fc.boolean(),
		loadA: real(0, 80)
	}),
	{ minLength: 1, maxLength: 6 }
);

/** Days and mounts as they occur. */
const likely = fc.record({
	position: fc.record({
		bayAirFraction: real(0, 1),
		airExposure: real(0, 1),
		exhaustView: real(0, 0.1),
		engineView: real(0, 0.3),
		guardFraction: real(0, 1)
	}),
	shield: fc.option(
		fc.record({ area: real(0.01, 0.277), coverage: real(0, 1), emissivityOut: real(0.03, 0.9) })
	),
	battery: fc.record({ r25: real(0.001, 0.05), capacityAh: real(20, 300), boardR: real(0.0002, 0.004) }),
	bms: fc.record({
		sensor: fc.constantFrom(...SENSORS),
		charge: fc.constant({ cut: 55, reset: 45 }),
		discharge: fc.constant({ cut: 65, reset: 55 }),
		cutDelayS: fc.constantFrom(0, 5, 600),
		autoReset: fc.boolean()
	}),
	climate: fc.record({ tMax: real(10, 50), dailyRange: real(3, 20), sunPeak: real(200, 1100) }),
	start: fc.record({ hour: real(0, 24), soc: real(0, 1) }),
	legs
});

/** Any number that a field takes, its limits included. */
const extremeGroup = (group: string) =>
	fc.record(
		Object.fromEntries(
			SCENARIO_FIELDS.filter((field) => field.group === group && field.kind === 'number').map((field) => {
				if (field.kind !== 'number') throw new Error('not a number field');
				const { min, max, key } = field;
				return [key, fc.oneof(real(min, max), fc.constantFrom(min, max), fc.constant(field.default ?? 1))];
			})
		),
		{ requiredKeys: [] }
	);
const extreme = fc.record(
	{
		vehicle: extremeGroup('vehicle'),
		engine: extremeGroup('engine'),
		exhaust: extremeGroup('exhaust'),
		bay: extremeGroup('bay'),
		bonnet: extremeGroup('bonnet'),
		enclosure: extremeGroup('enclosure'),
		position: extremeGroup('position'),
		tray: extremeGroup('tray'),
		battery: extremeGroup('battery'),
		charger: extremeGroup('charger'),
		climate: extremeGroup('climate'),
		legs: legs as fc.Arbitrary<unknown>
	},
	{ requiredKeys: ['legs'] }
);

describe('days drawn at random', () => {
	it('end finite, with the state of charge between 0 and 1 and the energy closed', () => {
		fc.assert(
			fc.property(likely, (input) => {
				const result = simulateScenario(input);
				if (result.status === 'failed') throw new Error(result.reason);
				const { minutes, report } = result;
				// Nothing can be colder than the sky, or hotter than the exhaust gas at full load.
				const coldest = input.climate.tMax - input.climate.dailyRange - 10;
				for (const name of NODE_NAMES) {
					const temps = minutes.nodes[name];
					expect(temps.every((temp) => temp >= coldest - 1e-6 && temp <= 760)).toBe(true);
				}
				expect(minutes.soc.every((soc) => soc >= 0 && soc <= 1)).toBe(true);
				expect(minutes.currentA.every(Number.isFinite)).toBe(true);
				expect(report.energy.maxRelativeImbalance).toBeLessThan(1e-6);
				expect(report.events.every((event, k, all) => k === 0 || all[k - 1]!.hour <= event.hour)).toBe(true);
			}),
			{ numRuns: 60, seed: 7 }
		);
	}, 120_000);

	it('give the same digits every time', () => {
		fc.assert(
			fc.property(likely, (input) => {
				expect(simulateScenario(structuredClone(input))).toEqual(simulateScenario(input));
			}),
			{ numRuns: 5, seed: 8 }
		);
	}, 60_000);
});

describe('fields at their limits', () => {
	it('either end finite, are refused, or give up with a reason', () => {
		fc.assert(
			fc.property(extreme, (input) => {
				try {
					const result = simulateScenario(input);
					if (result.status === 'failed') {
						expect(result.reason.length).toBeGreaterThan(10);
						expect(Number.isFinite(result.atHour)).toBe(true);
						return;
					}
					const { report, minutes } = result;
					const values = [...Object.values(report.end), ...Object.values(report.peaks)];
					expect(values.every((value) => value === null || Number.isFinite(value))).toBe(true);
					expect(minutes.soc.every((soc) => soc >= 0 && soc <= 1)).toBe(true);
				} catch (error) {
					if (!(error instanceof ScenarioError)) throw error;
					expect(error.path).not.toBe('');
				}
			}),
			{ numRuns: 80, seed: 9 }
		);
	}, 240_000);

	it('run a thousand legs over sixty days', () => {
		const plan = Array.from({ length: 1000 }, (_, k) => ({
			minutes: 86.4,
			engineOn: k % 3 === 0,
			speedKmh: k % 3 === 0 ? 80 : 0,
			loadA: k % 7
		}));
		const result = simulateScenario({ legs: plan });
		expect(result.status).toBe('done');
		expect(result.status === 'done' && result.minutes.count).toBe(86_401);
	}, 60_000);

	it('give up on a latch that opens and closes without end', () => {
		const result = simulateScenario({
			battery: { boardHeatCapacity: 0.1, boardR: 10, boardCellConductance: 100 },
			charger: { maxA: 100 },
			bms: { sensor: 'board', charge: { cut: 50, reset: 49.999999 } },
			start: { hour: 12, soc: 0.1 },
			legs: [{ minutes: 86_400, engineOn: true, loadA: 0 }]
		});
		expect(result).toMatchObject({ status: 'failed', reason: expect.stringContaining('steps') });
	}, 120_000);
});
