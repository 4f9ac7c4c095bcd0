import { describe, expect, it } from 'vitest';
import { parseScenario } from '../../src/lib/thermal';
import { readHeats } from '../../src/lib/thermal/network/read-heats';
import { readStep, type Step } from '../../src/lib/thermal/solve/stepper';
import type { NodeValues, Scenario } from '../../src/lib/thermal/types';
import { readCurrentA } from '../../src/lib/thermal/vehicle/charge';
import { describeVehicle } from '../../src/lib/thermal/vehicle/describe-vehicle';
import { emptyDrive, findDrive, findLegConstants } from '../../src/lib/thermal/vehicle/leg-drive';
import { countMinutes, MinuteRecord } from '../../src/lib/thermal/vehicle/minute-record';
import { STORED } from '../../src/lib/thermal/vehicle/network-table';
import type { Standing, StepSink } from '../../src/lib/thermal/vehicle/step-sink';
import { VehicleRun } from '../../src/lib/thermal/vehicle/vehicle-run';
import { ENGINE_CASES } from './support/cases';

/**
 * The energy of the model, integrated apart from the solver: every heat is read from the description of the network
 * at both ends and the middle of each step (Simpson's rule) and held against what the nodes store. The solver's own sums close to
 * rounding whatever its steps are; these close only where the steps follow the equations.
 */

/** Legs by the time at which they end, s. */
function listLegs({ legs }: Scenario) {
	let endS = 0;
	return legs.map((leg) => ({ leg, endS: (endS += leg.minutes * 60) }));
}

class Account implements StepSink {
	readonly gained: number[];
	readonly stored: number[];
	readonly passed: number[];
	private readonly legs;

	constructor(
		private readonly scenario: Scenario,
		private readonly names: readonly string[]
	) {
		this.gained = names.map(() => 0);
		this.stored = names.map(() => 0);
		this.passed = names.map(() => 0);
		this.legs = listLegs(scenario);
	}

	takeEnd(): void {}

	takeStep(step: Step, standing: Standing): void {
		const weigh = [1 / 6, 2 / 3, 1 / 6];
		[0, 0.5, 1].forEach((share, k) => this.addHeats(step, standing, share, weigh[k]! * step.lengthS));
		this.names.forEach((name, node) => {
			this.stored[node]! += STORED[name]!(this.scenario) * (step.to[node]! - step.from[node]!);
		});
	}

	private addHeats(step: Step, { span, spanStartS }: Standing, share: number, weightS: number): void {
		const { scenario, names } = this;
		const timeS = step.timeS + share * step.lengthS;
		const middleS = step.timeS + 0.5 * step.lengthS;
		const { leg } = this.legs.find(({ endS }) => middleS < endS)!;
		const constants = findLegConstants(scenario, leg);
		const drive = findDrive(scenario, leg, constants, scenario.start.hour + timeS / 3600, emptyDrive());
		const network = describeVehicle(scenario, leg, constants, drive, readCurrentA(span, timeS - spanStartS));
		const temps = Object.fromEntries(names.map((name, node) => [name, readStep(step, node, share)]));
		for (const { from, to, heatW, name } of readHeats(network, temps)) {
			// What air brings takes nothing from where it comes; what a gate carries was counted when it left.
			const given = !/^(gas to exhaust|air from radiator to bay|radiator carried)$/.test(name);
			this.count(to, heatW * weightS);
			if (given) this.count(from, -heatW * weightS);
		}
	}

	private count(name: string, heatJ: number): void {
		const node = this.names.indexOf(name);
		if (node < 0) return;
		this.gained[node]! += heatJ;
		this.passed[node]! += Math.abs(heatJ) / 2;
	}

	imbalance(): number {
		return Math.max(
			...this.names.map((_, node) => Math.abs(this.gained[node]! - this.stored[node]!) / this.passed[node]!)
		);
	}
}

function imbalanceOf(input: unknown, toleranceShare: number): number {
	const scenario = parseScenario(input);
	const run = new VehicleRun(scenario.shield !== null, true, toleranceShare);
	const account = new Account(scenario, run.stepper.names);
	expect(run.run(scenario, account)).toBeNull();
	expect(run.stepper.relativeImbalance()).toBeLessThan(1e-6);
	return account.imbalance();
}

const DAYS = ENGINE_CASES.slice(0, 6);

describe('the energy, integrated apart from the solver', () => {
	it.each(DAYS)('closes to a millionth with tight steps: $name', ({ input }) => {
		expect(imbalanceOf(input, 1e-4)).toBeLessThan(1e-6);
	});

	it.each(DAYS)('closes to a thousandth with the steps of every day: $name', ({ input }) => {
		expect(imbalanceOf(input, 1)).toBeLessThan(1e-3);
	});
});

describe('the steps of every day', () => {
	const minutesOf = (scenario: Scenario, toleranceShare: number) => {
		const run = new VehicleRun(scenario.shield !== null, false, toleranceShare);
		const record = new MinuteRecord(scenario, run.stepper.names, countMinutes(scenario));
		expect(run.run(scenario, record)).toBeNull();
		return { minutes: record.minutes, names: run.stepper.names as (keyof NodeValues)[] };
	};

	it.each(ENGINE_CASES)(
		'stay within 0.05 K of steps with a thousandth of their tolerance: $name',
		({ input }) => {
			const scenario = parseScenario(input);
			const { minutes, names } = minutesOf(scenario, 1);
			const tight = minutesOf(scenario, 1e-3).minutes;
			const furthestK = Math.max(
				...names.flatMap((name) =>
					Array.from(minutes.nodes[name], (tempC, k) => Math.abs(tempC - tight.nodes[name][k]!))
				)
			);
			expect(furthestK).toBeLessThan(0.05);
			expect(furthestK).toBeGreaterThan(0);
		}
	);
});
