import { describe, expect, it } from 'vitest';
import {
	heatFlowsAt,
	parseScenario,
	SCENARIO_FIELDS,
	SENSORS,
	SURFACES,
	type NodeValues,
	type Scenario
} from '../../src/lib/thermal';
import { hashWords } from '../../src/lib/thermal/statistics';
import { copyScenario } from '../../src/lib/thermal/uncertainty';
import { runScenario } from '../../src/lib/thermal/vehicle/simulate';
import { OutcomeRunner } from '../../src/lib/thermal/vehicle/outcome-run';

/**
 * A hundred thousand scenarios, drawn evenly from what occurs and beyond, and what has to hold for each of them. They
 * are drawn by a hash of their number, so that a scenario that fails can be made again from it.
 */

const SCENARIOS = 100_000;
const CHUNK = 5_000;
const TIMEOUT_MS = 240_000;

/** Numbers of one scenario, one after the other. */
class Draw {
	private next = 0;
	constructor(private readonly number: number) {}

	share(): number {
		return hashWords(this.number, this.next++) / 2 ** 32;
	}
	between(low: number, high: number): number {
		return low + (high - low) * this.share();
	}
	pick<T>(choices: readonly T[]): T {
		return choices[Math.floor(this.share() * choices.length)]!;
	}
	chance(share: number): boolean {
		return this.share() < share;
	}
}

function drawLegs(draw: Draw) {
	return Array.from({ length: 1 + Math.floor(draw.between(0, 4)) }, () => {
		const engineOn = draw.chance(0.65);
		return {
			minutes: draw.between(2, 120),
			engineOn,
			speedKmh: engineOn ? draw.between(0, 130) : 0,
			surface: draw.pick(SURFACES),
			gradePercent: draw.between(-8, 12),
			towMassKg: draw.chance(0.3) ? draw.between(0, 3500) : 0,
			bonnetOpen: draw.chance(0.2),
			loadA: draw.between(0, 80)
		};
	});
}

function drawLimits(draw: Draw) {
	const reset = draw.between(25, 60);
	return { cut: reset + draw.between(0.5, 30), reset };
}

function drawInput(number: number) {
	const draw = new Draw(number);
	const fraction = draw.share();
	return {
		bay: { leakClosed: draw.between(5, 60), share: draw.share() },
		bonnet: { absorptivity: draw.share() },
		enclosure: { coolGain: draw.chance(0.3) ? 150 : 0 },
		position: {
			bayAirFraction: fraction,
			enclosureFraction: (1 - fraction) * draw.share(),
			roadUplift: draw.chance(0.2) ? draw.between(0, 12) : 0,
			airExposure: draw.share(),
			exhaustView: draw.between(0, 0.08),
			engineView: draw.between(0, 0.3),
			bonnetView: draw.share(),
			guardFraction: draw.share()
		},
		shield: draw.chance(0.5)
			? { area: draw.between(0.01, 0.27), coverage: draw.share(), emissivityOut: draw.between(0.03, 0.9) }
			: null,
		battery: {
			capacityAh: draw.between(20, 300),
			r25: draw.between(0.001, 0.04),
			boardR: draw.between(0.0002, 0.004),
			caseCellConductance: draw.between(0.5, 8)
		},
		bms: {
			sensor: draw.pick(SENSORS),
			charge: drawLimits(draw),
			discharge: drawLimits(draw),
			cutDelayS: draw.pick([0, 0, 5, 600]),
			autoReset: draw.chance(0.8)
		},
		climate: {
			tMax: draw.between(-5, 52),
			dailyRange: draw.between(2, 22),
			sunPeak: draw.between(100, 1150),
			pressurePa: draw.between(60_000, 103_000)
		},
		start: { hour: draw.between(0, 24), soc: draw.share() },
		legs: drawLegs(draw)
	};
}

/** The first thing that does not hold of a scenario's run; null when all does. */
function findFault(scenario: Scenario): string | null {
	const result = runScenario(scenario);
	if (result.status === 'failed') return result.reason;
	const { report, minutes } = result;
	if (!(report.energy.maxRelativeImbalance <= 1e-6)) return `imbalance ${report.energy.maxRelativeImbalance}`;
	const values = [...Object.values(report.end), ...Object.values(report.peaks)];
	if (!values.every((value) => value === null || Number.isFinite(value))) return 'not a number';
	for (let minute = 0; minute < minutes.count; minute += 7) {
		if (!(minutes.soc[minute]! >= 0 && minutes.soc[minute]! <= 1))
			return `state of charge at minute ${minute}`;
		if (!Number.isFinite(minutes.nodes.cells[minute])) return `cells at minute ${minute}`;
	}
	return findChatter(report.events) ?? findUphill(scenario, report.end);
}

/** Heat that goes by itself from a colder to a hotter node at the end of a run; null where none does. */
function findUphill(scenario: Scenario, temps: NodeValues): string | null {
	const hour = scenario.start.hour + scenario.legs.reduce((sum, leg) => sum + leg.minutes, 0) / 60;
	let betweenNodes = 0;
	for (const flow of heatFlowsAt(scenario, temps, hour, scenario.legs.at(-1)!, 0)) {
		const from = temps[flow.from as keyof NodeValues];
		const to = temps[flow.to as keyof NodeValues];
		if (typeof from !== 'number' || typeof to !== 'number') continue;
		betweenNodes++;
		if (flow.heatW * (from - to) < 0) return `${flow.name} uphill`;
	}
	return betweenNodes > 0 ? null : 'no flow between two nodes was looked at';
}

/** Each latch opens and closes in turn, never twice at one instant. */
function findChatter(events: readonly { side: string; kind: string; hour: number }[]): string | null {
	for (const side of ['charge', 'discharge']) {
		const own = events.filter((event) => event.side === side);
		for (const [at, event] of own.entries()) {
			if (event.kind !== (at % 2 === 0 ? 'cut' : 'reset')) return `${side}: ${event.kind} out of turn`;
			if (at > 0 && !(event.hour > own[at - 1]!.hour)) return `${side}: two events at ${event.hour}`;
		}
	}
	return null;
}

const chunks = Array.from({ length: SCENARIOS / CHUNK }, (_, at) => at * CHUNK);

/** With latches that never move: what they do to the current is no matter of heat alone. */
function withoutLatches(scenario: Scenario): Scenario {
	const changed = copyScenario(scenario);
	changed.bms.charge = { cut: 900, reset: 899 };
	changed.bms.discharge = { cut: 900, reset: 899 };
	return changed;
}

const runner = new OutcomeRunner();
const peakOf = (scenario: Scenario) => runner.run(scenario).peakSensorC;
/** What two runs may differ by because each is exact to 0.05 K. */
const EXACT_K = 0.05;

/** A day five kelvin hotter leaves what the BMS watches cooler. */
function isCoolerOnHotterDay(number: number): boolean {
	const scenario = withoutLatches(parseScenario(drawInput(number)));
	const hotter = copyScenario(scenario);
	hotter.climate.tMax += 5;
	return !(peakOf(hotter) >= peakOf(scenario) - EXACT_K);
}

/** A brighter shield on a side that faces a hot exhaust leaves it hotter. */
function isHotterBehindBrighter(number: number): boolean {
	const scenario = withoutLatches(parseScenario(drawInput(number)));
	const draw = new Draw(number + SCENARIOS);
	scenario.position.exhaustView = draw.between(0.03, 0.1);
	scenario.position.engineView = 0;
	scenario.legs = [{ ...scenario.legs[0]!, minutes: 180, engineOn: true, speedKmh: 80, bonnetOpen: false }];
	const shield = { area: 0.1, coverage: 0.9, emissivityIn: 0.1, gap: 10, heatCapacity: 200 };
	const dull = { ...scenario, shield: { ...shield, emissivityOut: 0.8 } };
	const bright = { ...scenario, shield: { ...shield, emissivityOut: 0.05 } };
	return !(peakOf(bright) <= peakOf(dull) + EXACT_K);
}

describe('a hundred thousand scenarios', () => {
	const numbersFrom = (from: number) => Array.from({ length: CHUNK }, (_, at) => from + at);

	it.each(chunks)(
		'stay finite, close their energy, never chatter, and let no heat go uphill, from number %d on',
		(from) => {
			const faults = numbersFrom(from).flatMap((number) => {
				const fault = findFault(parseScenario(drawInput(number)));
				return fault === null ? [] : [`${number}: ${fault}`];
			});
			expect(faults).toEqual([]);
		},
		TIMEOUT_MS
	);

	it.each(chunks)(
		'are not left cooler by a day five kelvin hotter, from number %d on',
		(from) => expect(numbersFrom(from).filter(isCoolerOnHotterDay)).toEqual([]),
		TIMEOUT_MS
	);

	it.each(chunks)(
		'are not left hotter by a brighter shield before a hot exhaust, from number %d on',
		(from) => expect(numbersFrom(from).filter(isHotterBehindBrighter)).toEqual([]),
		TIMEOUT_MS
	);
});

describe('an invalid input', () => {
	const path = (group: string, key: string) => (group === 'legs' ? `legs[0].${key}` : `${group}.${key}`);

	/** The scenario that says this value for this field, and nothing else. */
	function say(group: string, key: string, value: unknown): unknown {
		if (group === 'legs') return { legs: [{ minutes: 60, [key]: value }] };
		const [outer, inner] = group.split('.') as [string, string | undefined];
		const fields = { [key]: value };
		return { legs: [{ minutes: 60 }], [outer]: inner === undefined ? fields : { [inner]: fields } };
	}

	const cases = SCENARIO_FIELDS.flatMap((field) => {
		const wrong: [string, unknown][] = [
			['a word', 'much'],
			['null', null],
			['a list', [1]],
			...(field.kind === 'number'
				? ([
						['no number', NaN],
						['infinity', Infinity],
						['below its range', field.min - Math.max(1e-6, Math.abs(field.min) * 1e-6)],
						['above its range', field.max + Math.max(1e-6, Math.abs(field.max) * 1e-6)]
					] as [string, unknown][])
				: [['a number', 12.5] as [string, unknown]])
		];
		return wrong.map(([what, value]) => ({ group: field.group, key: field.key, what, value }));
	});

	it.each(cases)('of $group.$key, $what, is refused with its path', ({ group, key, value }) => {
		expect(() => parseScenario(say(group, key, value))).toThrow(
			expect.objectContaining({ name: 'ScenarioError', path: path(group, key) })
		);
	});
});
