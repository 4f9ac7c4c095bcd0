import { describe, expect, it } from 'vitest';
import { CompiledNetwork } from '../network/compile-network';
import { RosenbrockStepper } from '../solve/rosenbrock';
import type { Step } from '../solve/stepper';
import type { ScenarioInput } from '../types';
import { planChargeSpan, readCurrentA, readSoc } from './charge';
import { ambientTempC, sunWPerM2 } from './climate';
import { describeVehicle } from './describe-vehicle';
import { heatFlowsAt } from './heat-flows';
import { emptyDrive, findDrive, findLegConstants } from './leg-drive';
import { parseScenario } from './parse-scenario';
import { coefficientDefaults, SCENARIO_FIELDS } from './scenario-fields';
import { simulateScenario } from './simulate';
import { VehicleStepper } from './vehicle-stepper';

function run(input: ScenarioInput) {
	const result = simulateScenario(input);
	if (result.status === 'failed') throw new Error(result.reason);
	return result;
}

describe('the design day', () => {
	// ASHRAE Fundamentals 2021, ch. 14, Table 6, for 40 °C and a range of 14 K.
	it.each([
		[1, 27.68],
		[5, 26],
		[10, 34.68],
		[12, 38.18],
		[14, 40],
		[15, 40],
		[18, 36.64],
		[24, 28.52],
		[36, 38.18]
	])('has at hour %d %d °C', (hour, tempC) => {
		expect(ambientTempC(hour, { tMax: 40, dailyRange: 14 })).toBeCloseTo(tempC, 9);
	});

	it('has its mean of 32.4925 °C', () => {
		const sum = Array.from({ length: 24 }, (_, h) => ambientTempC(h, { tMax: 40, dailyRange: 14 }));
		expect(sum.reduce((a, b) => a + b, 0) / 24).toBeCloseTo(32.4925, 4);
	});

	it('has sun from six to six, highest at noon', () => {
		const climate = { sunPeak: 900 };
		expect([0, 5.9, 6, 18, 23, 30].map((hour) => sunWPerM2(hour, climate))).toEqual([0, 0, 0, 0, 0, 0]);
		expect(sunWPerM2(36, climate)).toBeCloseTo(900, 9);
		expect(sunWPerM2(8, climate)).toBeCloseTo(900 * 0.5 ** 1.2, 9);
	});
});

describe('the charge', () => {
	const scenario = parseScenario({
		charger: { maxA: 40, taperSoc: 0.9 },
		legs: [{ minutes: 1, engineOn: true }]
	});
	const leg = { ...scenario.legs[0]!, loadA: 10 };
	const closed = { chargeOpen: false, dischargeOpen: false };

	it('fills with what the loads leave, up to where the taper takes less', () => {
		const span = planChargeSpan(scenario, leg, 0.5, closed);
		expect(span).toMatchObject({ currentA: 30, decayPerS: 0 });
		expect(span.socAtEnd).toBeCloseTo(1 - 0.1 * (30 / 40), 12);
		expect(span.lastsS).toBeCloseTo(((0.925 - 0.5) * 100 * 3600) / 30, 6);
	});

	it('tapers so that current and distance to full fall together', () => {
		const span = planChargeSpan(scenario, leg, 0.95, closed);
		expect(span.currentA).toBeCloseTo(20, 9);
		const soc = readSoc(span, 500);
		expect(readCurrentA(span, 500)).toBeCloseTo((40 * (1 - soc)) / 0.1, 9);
	});

	it('gives nothing while the charge latch is open and says what it would have given', () => {
		expect(planChargeSpan(scenario, leg, 0.95, { ...closed, chargeOpen: true })).toMatchObject({
			currentA: 0,
			refusedA: expect.closeTo(20, 9)
		});
	});

	it('discharges through an open charge latch, not through an open discharge latch, not when empty', () => {
		const parked = { ...leg, engineOn: false };
		const current = (soc: number, latches: typeof closed) =>
			planChargeSpan(scenario, parked, soc, latches).currentA;
		expect(current(0.5, { ...closed, chargeOpen: true })).toBe(-10);
		expect(current(0.5, { ...closed, dischargeOpen: true })).toBe(0);
		expect(current(0, closed)).toBe(0);
	});

	it.each([0.95, 0.955 - 2e-16, 1e-18, 5e-324, 1 - 1e-16])('comes to an end from a state of %d', (soc) => {
		const { report } = run({
			start: { soc },
			legs: [
				{ minutes: 60, engineOn: true, loadA: 4 },
				{ minutes: 60, loadA: 50 }
			]
		});
		expect(report.end.soc).toBeLessThan(1);
	});
});

describe('the vehicle as a network', () => {
	const scenario = parseScenario({
		shield: {},
		enclosure: { coolGain: 150 },
		position: { enclosureFraction: 0.1, roadUplift: 3 },
		legs: [{ minutes: 600, engineOn: true, speedKmh: 70, loadA: 60 }]
	});
	const leg = scenario.legs[0]!;
	const temps = {
		engine: 88,
		exhaust: 300,
		bay: 70,
		bonnet: 65,
		enclosure: 35,
		shield: 75,
		tray: 55,
		case: 50,
		cells: 45,
		board: 47
	};

	it.each([true, false])(
		'takes the steps that the general network core takes (with a shield: %s)',
		(shielded) => {
			const { tailored, general } = stepBoth(shielded ? scenario : { ...scenario, shield: null });
			for (const row of ['to', 'inner2', 'inner3', 'error'] as const) {
				// The core finds ∂H/∂t by a difference, this one by formula: to 1e-4 of a step's whole change.
				tailored[row].forEach((value, node) => expect(value).toBeCloseTo(general[row][node]!, 4));
			}
		}
	);

	/** One step of five minutes by the generated code and by the general core, on the same network at the same hour. */
	function stepBoth(ofScenario: typeof scenario): { tailored: Step; general: Step } {
		const timeS = 4.2 * 3600;
		const lengthS = 300;
		const constants = findLegConstants(ofScenario, leg);
		const stepper = new VehicleStepper(ofScenario.shield !== null, false);
		const start = Float64Array.from(stepper.names, (name) => temps[name as keyof typeof temps]);
		const span = planChargeSpan(ofScenario, leg, 0.5, { chargeOpen: false, dischargeOpen: false });
		stepper.startLeg({ scenario: ofScenario, leg, constants }, timeS);
		stepper.clock.setSpan(span, timeS);
		stepper.clock.enterSegment(timeS);
		stepper.prepare(timeS, start);
		stepper.tryStep(lengthS);

		const describeAt = (atS: number) => {
			const drive = findDrive(ofScenario, leg, constants, 6 + atS / 3600, emptyDrive());
			return describeVehicle(ofScenario, leg, constants, drive, span.currentA);
		};
		const network = new CompiledNetwork(describeAt(timeS));
		network.drive = (atS) => network.take(describeAt(atS));
		const general = new RosenbrockStepper(network);
		general.prepare(timeS, start, lengthS, false);
		general.tryStep(lengthS);
		return { tailored: stepper.step, general: general.step };
	}

	it('gives a ledger whose sum is what warms the cells', () => {
		const flows = heatFlowsAt(scenario, temps, 11.3, leg, -20);
		const sum = flows.reduce(
			(total, { from, to, heatW }) => total + (to === 'cells' ? heatW : 0) - (from === 'cells' ? heatW : 0),
			0
		);
		const resistance = 0.012 * Math.exp(1500 * (1 / 318.15 - 1 / 298.15));
		expect(sum).toBeCloseTo(2.5 * (50 - 45) + 0.5 * (47 - 45) + 400 * resistance, 9);
		expect(flows.map(({ name }) => name)).toContain('exhaust radiation to shield');
		expect(flows.every(({ name }) => name !== 'engine to bay')).toBe(true);
	});
});

describe('a run', () => {
	it('starts everything at the air of the starting hour', () => {
		const { report } = run({ shield: {}, start: { hour: 10, soc: 0.2 }, legs: [{ minutes: 1 }] });
		const { hour, soc, ...temps } = report.hourly[0]!;
		expect([hour, soc]).toEqual([10, 0.2]);
		expect(new Set(Object.values(temps))).toEqual(new Set([42 - 15 * 0.38]));
	});

	it('ends between two minutes when the legs do', () => {
		const { report, minutes } = run({ legs: [{ minutes: 10.5, engineOn: true }, { minutes: 0.25 }] });
		expect(minutes.count).toBe(11);
		expect(report.end.exhaust).not.toBe(minutes.nodes.exhaust[10]);
	});

	it('counts hours on past midnight', () => {
		const { report } = run({ start: { hour: 23 }, legs: [{ minutes: 180 }] });
		expect(report.hourly.map(({ hour }) => hour)).toEqual([23, 24, 25, 26]);
	});

	it('shows current and latch right after an event, and what the charger could not give', () => {
		const { report, minutes, chargeRefusedAh } = run({
			bms: { charge: { cut: 30, reset: 25 } },
			start: { hour: 12 },
			legs: [{ minutes: 90, engineOn: true }]
		});
		expect(report.events).toEqual([{ side: 'charge', kind: 'cut', hour: 12 }]);
		expect([minutes.currentA[0], minutes.chargeOpen[0], minutes.dischargeOpen[0]]).toEqual([0, 1, 0]);
		expect(chargeRefusedAh).toBeCloseTo(40 * 1.5, 9);
		expect(report.end.soc).toBe(0.55);
	});

	it('keeps a latch that needs somebody open to the end of the last leg', () => {
		const input: ScenarioInput = {
			bms: { charge: { cut: 35, reset: 34 }, autoReset: false },
			start: { hour: 15 },
			legs: [{ minutes: 1400 }]
		};
		expect(run(input).report.events).toEqual([{ side: 'charge', kind: 'cut', hour: 15 }]);
		expect(run({ ...input, bms: { ...input.bms, autoReset: true } }).report.events.length).toBeGreaterThan(1);
	});

	it('takes a case and a shield that radiate nothing as the limit of ones that hardly do', () => {
		const peaksAt = (emissivity: number) =>
			run({
				battery: { caseEmissivity: emissivity },
				shield: { emissivityIn: emissivity },
				legs: [{ minutes: 60, engineOn: true, speedKmh: 60 }, { minutes: 60 }]
			}).report.peaks;
		const { case: caseC, shield } = peaksAt(0);
		const almost = peaksAt(1e-9);
		expect(caseC).toBeCloseTo(almost.case, 5);
		expect(shield).toBeCloseTo(almost.shield!, 5);
	});

	it('does not change its input', () => {
		const scenario = parseScenario({ legs: [{ minutes: 30, engineOn: true }] });
		const before = structuredClone(scenario);
		run(scenario);
		expect(scenario).toEqual(before);
	});
});

describe('legs', () => {
	it('may be sixty days together, also of parts that do not add up to the last digit, and no minute more', () => {
		const parts = Array.from({ length: 61 }, () => ({ minutes: 86_400 / 61 }));
		expect(parts.reduce((sum, { minutes }) => sum + minutes, 0)).toBeGreaterThan(86_400);
		expect(parseScenario({ legs: parts }).legs).toHaveLength(61);
		const longer = [...parts, { minutes: 1 }];
		expect(() => parseScenario({ legs: longer })).toThrow('(60 days)');
	});
});

describe('the table of fields', () => {
	it('names each field once, with a default inside its range', () => {
		const names = SCENARIO_FIELDS.map(({ group, key }) => `${group}.${key}`);
		expect(new Set(names).size).toBe(names.length);
		for (const field of SCENARIO_FIELDS) {
			if (field.kind !== 'number' || field.default === null) continue;
			expect(field.default).toBeGreaterThanOrEqual(field.min);
			expect(field.default).toBeLessThanOrEqual(field.max);
		}
	});

	it('hands out the coefficients that an engineer tunes, a fresh copy each time', () => {
		const defaults = coefficientDefaults();
		defaults.bay.leakClosed = 1;
		expect(coefficientDefaults().bay.leakClosed).toBe(20);
		expect(Object.keys(defaults.shield)).toHaveLength(6);
	});
});
