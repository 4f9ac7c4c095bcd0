import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { minutesTrace, noiseAt } from '../../../../tests/support/trace-files';
import { EngineInputError } from '../correlations/require';
import { parseScenario } from '../vehicle/parse-scenario';
import { runScenario } from '../vehicle/simulate';
import { endOf, type BinnedTrace } from './binned-trace';
import { findChangePoints, type ChangeSignal } from './change-points';
import { clockHourAt, dayPlanFromLegs, scenarioLegs } from './plan-from-legs';
import { proposeLegs } from './propose-legs';
import { joinLegs, measureLegs, moveBoundary, setLegKind, splitLeg, type TraceLeg } from './trace-legs';

/** The best cut by trying all of them. */
function cutPlainly(
	values: readonly number[],
	cost: (part: readonly number[]) => number,
	penalty: number
): number {
	const best = [-penalty];
	for (let to = 1; to <= values.length; to++) {
		best[to] = Math.min(
			...best.slice(0, to).map((sum, from) => sum + cost(values.slice(from, to)) + penalty)
		);
	}
	return best[values.length]!;
}

const squares = (part: readonly number[]): number => {
	const mean = part.reduce((a, b) => a + b, 0) / part.length;
	return part.reduce((sum, value) => sum + (value - mean) ** 2, 0);
};
const squaresAboutLine = (part: readonly number[]): number => {
	const middle = (part.length - 1) / 2;
	const below = part.reduce((sum, _, at) => sum + (at - middle) ** 2, 0);
	const slope = below === 0 ? 0 : part.reduce((sum, value, at) => sum + (at - middle) * value, 0) / below;
	return squares(part.map((value, at) => value - slope * (at - middle)));
};
const COSTS = { level: squares, line: squaresAboutLine };

describe('changes', () => {
	it.each(['level', 'line'] as const)('of a %s are cut as well as trying all cuts could', (shape) => {
		const series = fc.array(fc.integer({ min: 0, max: 12 }), { minLength: 1, maxLength: 24 });
		fc.assert(
			fc.property(series, fc.integer({ min: 1, max: 40 }), (values, penalty) => {
				const cuts = findChangePoints([{ values, shape, noise: 1 }], penalty);
				const ends = [0, ...cuts, values.length];
				const parts = ends.slice(1).map((end, at) => values.slice(ends[at], end));
				const cost = parts.reduce((sum, part) => sum + COSTS[shape](part), penalty * cuts.length);
				expect(cost).toBeCloseTo(cutPlainly(values, COSTS[shape], penalty), 6);
			}),
			{ numRuns: 200, seed: 5 }
		);
	});

	it('of two series are where both change', () => {
		const values = (low: number, high: number) =>
			Array.from({ length: 40 }, (_, at) => (at < 23 ? low : high) + 0.3 * noiseAt(at));
		const signals: ChangeSignal[] = [values(0, 1), values(5, 4)].map((series) => ({
			values: series,
			shape: 'level',
			noise: 0.5
		}));
		expect(findChangePoints(signals, 20)).toEqual([23]);
		expect(findChangePoints(signals.slice(1), 200)).toEqual([]);
	});

	it('of a line are where it bends', () => {
		const values = Array.from({ length: 60 }, (_, at) => (at < 30 ? at : 60 - at));
		const [cut, ...others] = findChangePoints([{ values, shape: 'line', noise: 1 }], 10);
		expect(others).toEqual([]);
		expect(Math.abs(cut! - 30)).toBeLessThanOrEqual(1);
	});

	it.each([
		['nothing', [], 1],
		['no noise', [{ values: [1], shape: 'level', noise: 0 }], 1],
		['no penalty', [{ values: [1], shape: 'level', noise: 1 }], 0],
		[
			'two lengths',
			[
				{ values: [1], shape: 'level', noise: 1 },
				{ values: [1, 2], shape: 'level', noise: 1 }
			],
			1
		]
	] as const)('are not looked for in %s', (_, signals, penalty) => {
		expect(() => findChangePoints(signals as readonly ChangeSignal[], penalty)).toThrow(EngineInputError);
	});
});

/** Minutes of each part of a day: standing, 85 km/h, a short halt, 85 and then 45 km/h, standing for the night. */
const DAY = [
	{ minutes: 30, speedKmh: 0 },
	{ minutes: 120, speedKmh: 85 },
	{ minutes: 20, speedKmh: 0 },
	{ minutes: 90, speedKmh: 85 },
	{ minutes: 60, speedKmh: 45 },
	{ minutes: 300, speedKmh: 0 }
] as const;
const spread = <Part extends { minutes: number }>(
	valueOf: (part: Part, minute: number) => number,
	parts: readonly Part[]
) => parts.flatMap((part) => Array.from({ length: part.minutes }, (_, minute) => valueOf(part, minute)));
const minuteCount = DAY.reduce((sum, { minutes }) => sum + minutes, 0);
const speeds = spread(({ speedKmh }) => speedKmh, DAY).map((speed, at) =>
	speed === 0 ? 0 : speed + 12 * noiseAt(at)
);
const currents = spread(({ speedKmh }) => (speedKmh > 0 ? 18 : 0), DAY).map(
	(value, at) => value - (at % 15 < 6 ? 4 : 0) + 0.2 * noiseAt(at)
);
/** A shield that goes towards 160 °C while driving and 35 °C else, with a time constant of 12 minutes. */
const shield: number[] = [];
for (const speed of speeds) {
	const before = shield.at(-1) ?? 35;
	shield.push(before + ((speed > 0 ? 160 : 35) - before) / 12);
}

/** Legs follow each other over the whole trace, none shorter than a minute. */
function expectContiguous(legs: readonly TraceLeg[], trace: BinnedTrace): void {
	expect(legs[0]!.startS).toBe(trace.startS);
	expect(legs.at(-1)!.endS).toBe(endOf(trace));
	legs.slice(1).forEach(({ startS }, at) => expect(startS).toBe(legs[at]!.endS));
	for (const { startS, endS } of legs) expect(endS - startS).toBeGreaterThanOrEqual(60);
}

const inMinutes = (legs: readonly TraceLeg[]) =>
	legs.map(({ kind, startS, endS }) => [kind, (endS - startS) / 60]);

describe('the legs of a trace', () => {
	const trace = minutesTrace(
		{ speedKmh: speeds, currentA: currents, exhaustShieldC: shield },
		{ startS: 6 * 3600 }
	);

	it('come from its speed, to the minute, two drives at other speeds apart', () => {
		const legs = proposeLegs(trace);
		expectContiguous(legs, trace);
		expect(inMinutes(legs)).toEqual([
			['stopped', 30],
			['driving', 120],
			['stopped', 20],
			['driving', 90],
			['driving', 60],
			['stopped', 300]
		]);
		expect(legs[1]!.meanSpeedKmh).toBeCloseTo(85, 0);
		expect(legs.map(({ why }) => why)).toContain('speed 85 km/h');
	});

	it('pass over a halt at a crossing', () => {
		const halted = speeds.map((speed, at) => (at >= 60 && at < 63 ? 0 : speed));
		expect(proposeLegs(minutesTrace({ speedKmh: halted }))).toHaveLength(6);
		expect(proposeLegs(minutesTrace({ speedKmh: halted }), { shortestMinutes: 1 })).toHaveLength(8);
	});

	it.each([
		['charge and heat', { currentA: currents, exhaustShieldC: shield }, 2],
		['charge alone, while the fridge comes and goes', { currentA: currents }, 2],
		['the heat of the shield alone', { exhaustShieldC: shield }, 6]
	])('come from %s without a speed, to some minutes', (_, channels, within) => {
		const legs = proposeLegs(minutesTrace(channels));
		expect(legs.map(({ kind }) => kind)).toEqual(['stopped', 'driving', 'stopped', 'driving', 'stopped']);
		[30, 150, 170, 320].forEach((end, at) =>
			expect(Math.abs(legs[at]!.endS / 60 - end)).toBeLessThanOrEqual(within)
		);
	});

	it('are one where nothing tells', () => {
		const [leg, ...others] = proposeLegs(minutesTrace({ cellC: speeds }));
		expect(others).toEqual([]);
		expect(leg).toMatchObject({
			kind: 'stopped',
			meanSpeedKmh: null,
			why: 'nothing in the trace tells of driving'
		});
	});

	it('are bridged where the trace is silent for some minutes', () => {
		const silent = speeds.map((speed, at) => (at >= 50 && at < 70 ? NaN : speed));
		expect(inMinutes(proposeLegs(minutesTrace({ speedKmh: silent })))).toEqual(inMinutes(proposeLegs(trace)));
	});

	it('are as few as one says', () => {
		for (const mostLegs of [5, 3, 1]) {
			const legs = proposeLegs(trace, { mostLegs });
			expect(legs.length).toBeLessThanOrEqual(mostLegs);
			expectContiguous(legs, trace);
		}
	});

	it('of weeks are found on a coarser grid', () => {
		const weeks = Array.from({ length: 12 * 1440 - 1 }, (_, minute) =>
			minute % 1440 >= 480 && minute % 1440 < 720 ? 80 : 0
		);
		const long = minutesTrace({ speedKmh: weeks });
		const legs = proposeLegs(long);
		expect(legs.filter(({ kind }) => kind === 'driving')).toHaveLength(12);
		expectContiguous(legs, long);
	});

	it('need a length above zero and a whole number', () => {
		expect(() => proposeLegs(trace, { shortestMinutes: 0 })).toThrow(EngineInputError);
		expect(() => proposeLegs(trace, { mostLegs: 0.5 })).toThrow('mostLegs');
	});
});

describe('legs put right by hand', () => {
	const trace = minutesTrace({ speedKmh: speeds });
	const legs = proposeLegs(trace);

	it('stay contiguous and a minute long, whatever is done to them', () => {
		const change = fc.record({
			what: fc.constantFrom('move', 'split', 'join', 'kind'),
			index: fc.integer({ min: -1, max: 8 }),
			atS: fc.integer({ min: -100, max: 40_000 })
		});
		fc.assert(
			fc.property(fc.array(change, { maxLength: 20 }), (changes) => {
				let now: TraceLeg[] = legs;
				for (const { what, index, atS } of changes) {
					try {
						if (what === 'move') now = moveBoundary(now, index, atS);
						if (what === 'split') now = splitLeg(now, index, atS);
						if (what === 'join') now = joinLegs(now, index);
						if (what === 'kind') now = setLegKind(now, index, 'stopped');
					} catch (error) {
						expect(error).toBeInstanceOf(EngineInputError);
					}
					expectContiguous(now, trace);
				}
			}),
			{ numRuns: 200, seed: 9 }
		);
	});

	it('move a boundary, split and join again to what they were', () => {
		const moved = moveBoundary(legs, 0, 40 * 60);
		expect(inMinutes(moved).slice(0, 2)).toEqual([
			['stopped', 40],
			['driving', 110]
		]);
		expect(moveBoundary(moved, 0, 30 * 60)).toEqual(legs);
		const split = splitLeg(legs, 1, 90 * 60);
		expect(inMinutes(split).slice(1, 3)).toEqual([
			['driving', 60],
			['driving', 60]
		]);
		expect(inMinutes(joinLegs(split, 1))).toEqual(inMinutes(legs));
		expect(measureLegs(trace, joinLegs(split, 1))).toEqual(legs);
	});

	it('leave what they were given as it was', () => {
		const copy = structuredClone(legs);
		moveBoundary(legs, 0, 40 * 60);
		setLegKind(legs, 0, 'driving');
		expect(legs).toEqual(copy);
	});

	it.each([
		['a boundary into the minute before', () => moveBoundary(legs, 0, 59), 'toS'],
		['a boundary past the next leg', () => moveBoundary(legs, 0, 150 * 60), 'toS'],
		['a boundary to nowhere', () => moveBoundary(legs, 0, NaN), 'toS'],
		['the end of the last leg', () => moveBoundary(legs, 5, 3600), 'index'],
		['a leg that there is not', () => setLegKind(legs, 6, 'driving'), 'index'],
		['half a leg', () => joinLegs(legs, 0.5), 'index'],
		['a cut at the end', () => splitLeg(legs, 0, 30 * 60), 'atS']
	])('refuse %s', (_, change, input) => {
		expect(change).toThrow(EngineInputError);
		expect(change).toThrow(input);
	});

	it('read their speed anew from the trace', () => {
		const [first] = measureLegs(trace, moveBoundary(legs, 0, 60 * 60));
		expect(first!.meanSpeedKmh).toBeCloseTo(85 / 2, 0);
	});
});

describe('the day plan of a trace', () => {
	const trace = minutesTrace({ speedKmh: speeds, currentA: currents }, { startS: 6 * 3600 });
	const choices = { name: 'Measured', startSoc: 0.6, chargerMaxA: 40 } as const;
	const plan = dayPlanFromLegs(trace, proposeLegs(trace), choices);

	it('begins at its hour, with the legs in the plan’s own words and the load of the stops', () => {
		expect(plan).toMatchObject({ name: 'Measured', startHour: 6, startSoc: 0.6, chargerMaxA: 40 });
		expect(plan.legs.map(({ kind, minutes, engineOn }) => [kind, minutes, engineOn])).toEqual([
			['stop', 30, false],
			['drive', 120, true],
			['stop', 20, false],
			['drive', 90, true],
			['drive', 60, true],
			['camp', 300, false]
		]);
		expect(plan.legs[0]!.loadA).toBeCloseTo(1.6, 1);
	});

	it('runs in the engine', () => {
		const scenario = parseScenario({
			start: { hour: plan.startHour, soc: plan.startSoc },
			legs: scenarioLegs(plan)
		});
		const run = runScenario(scenario);
		expect(run.status).toBe('done');
		expect(scenario.legs.reduce((sum, { minutes }) => sum + minutes, 0)).toBe(minuteCount);
	});

	it('of a slow drive is a crawl, of a drive without speed what one says, of a long stay several camps', () => {
		const leg = { startS: 0, endS: 1800, kind: 'driving', meanSpeedKmh: 12, why: '' } as const;
		const planned = (change: Partial<TraceLeg>) =>
			dayPlanFromLegs(trace, [{ ...leg, ...change }], { ...choices, speedKmh: 65 }).legs;
		expect(planned({})[0]).toMatchObject({ kind: 'crawl', speedKmh: 12 });
		expect(planned({ meanSpeedKmh: null })[0]).toMatchObject({ kind: 'drive', speedKmh: 65 });
		const stay = planned({ kind: 'stopped', endS: 2 * 86_400 });
		expect(stay.map(({ kind, minutes, speedKmh }) => [kind, minutes, speedKmh])).toEqual([
			['camp', 1440, 0],
			['camp', 1440, 0]
		]);
	});

	it('begins by the clock of the zone, summer time included', () => {
		const zone = { timeBase: 'utc', timeZone: 'Australia/Adelaide' } as const;
		expect(clockHourAt(zone, Date.UTC(2026, 0, 15, 0, 0) / 1000)).toBe(10.5);
		expect(clockHourAt(zone, Date.UTC(2026, 6, 15, 0, 0) / 1000)).toBe(9.5);
		expect(clockHourAt({ timeBase: 'utc', timeZone: null }, -1800)).toBe(23.5);
	});

	it('asks for the hour where the trace does not tell it, and for legs', () => {
		const elapsed = { ...trace, timeBase: 'elapsed' } as const;
		expect(() => dayPlanFromLegs(elapsed, proposeLegs(elapsed), choices)).toThrow('startHour');
		expect(dayPlanFromLegs(elapsed, proposeLegs(elapsed), { ...choices, startHour: 7.5 }).startHour).toBe(
			7.5
		);
		expect(() => dayPlanFromLegs(trace, [], choices)).toThrow('legs.length');
	});
});
