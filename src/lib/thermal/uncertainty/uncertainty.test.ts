import { describe, expect, it } from 'vitest';
import { HOT_SIDE, TOURING_LEGS } from '../../../../tests/support/hot-side';
import type { Scenario } from '../types';
import { finishWork } from './finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import { simulateScenario } from '../vehicle/simulate';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { countCutOutDays } from './cut-out-days';
import { copyScenario, drawScenario, moveBy } from './draw-scenario';
import { findHottestDay } from './hottest-day';
import { rankInfluences } from './influence';
import { PRIORS } from './priors';
import { spreadDay } from './spread-day';

const scenarioWith = (more: object = {}): Scenario =>
	parseScenario({ position: HOT_SIDE, legs: TOURING_LEGS, ...more });
const WITH_SHIELD = scenarioWith({ shield: {} });
/** A limit that half of the days drawn reach. */
const EDGE = scenarioWith({ bms: { discharge: { cut: 66, reset: 55 } } });

describe('a copy of a scenario', () => {
	it('is equal to it, and no part of it is the same object', () => {
		const copy = copyScenario(WITH_SHIELD);
		expect(copy).toEqual(WITH_SHIELD);
		for (const group of Object.keys(copy) as (keyof Scenario)[])
			expect(copy[group]).not.toBe(WITH_SHIELD[group]);
		expect(copy.bms.charge).not.toBe(WITH_SHIELD.bms.charge);
		expect(copy.legs[0]).not.toBe(WITH_SHIELD.legs[0]);
	});
});

describe('what is not known', () => {
	it('is named once each, with words for people, a basis and something to measure', () => {
		expect(new Set(PRIORS.map(({ key }) => key)).size).toBe(PRIORS.length);
		for (const { label, basis, measure } of PRIORS) {
			expect([label, basis, measure].every((words) => words.length > 10)).toBe(true);
		}
	});

	it.each(PRIORS)('moves something in one scenario or another, and nothing in its middle: $key', (prior) => {
		const middle = drawScenario(WITH_SHIELD, [0.5], [prior]);
		expect(JSON.stringify(middle)).toBe(JSON.stringify(WITH_SHIELD));
		expect(drawScenario(WITH_SHIELD, [0.9], [prior])).not.toEqual(middle);
	});

	it.each([0.0001, 0.02, 0.98, 0.9999])('stays possible far out, at %d', (u) => {
		const drawn = drawScenario(
			WITH_SHIELD,
			PRIORS.map(() => u)
		);
		expect(() => parseScenario(drawn)).not.toThrow();
	});

	it('moves by factors, by shifts, and shares on their own scale', () => {
		expect(moveBy({ kind: 'factor', sigma: 0.5 }, 2, 10)).toBeCloseTo(10 * Math.E, 12);
		expect(moveBy({ kind: 'shift', sigma: 1.5 }, -2, 40)).toBe(37);
		expect(moveBy({ kind: 'share', sigma: 1 }, 1, 0.5)).toBeCloseTo(1 / (1 + Math.exp(-1)), 12);
		expect([0, 1].map((value) => moveBy({ kind: 'share', sigma: 1 }, 3, value))).toEqual([0, 1]);
	});
});

describe('an outcome', () => {
	it.each([
		['without a shield', EDGE],
		['with one', WITH_SHIELD],
		['of a board that is watched', scenarioWith({ bms: { sensor: 'board', charge: { cut: 55, reset: 50 } } })]
	])('says of a run what the report says (%s)', (_name, scenario) => {
		const cells = new Float64Array(20).fill(NaN);
		const outcome = new OutcomeRunner().run(scenario, cells, 60);
		const full = simulateScenario(scenario);
		if (full.status === 'failed') throw new Error(full.reason);
		const { minutes, report } = full;
		const watched = minutes.nodes[scenario.bms.sensor === 'board' ? 'board' : 'cells'];
		expect(outcome.peakSensorC).toBe(Math.max(...watched));
		expect(Array.from(cells)).toEqual(report.hourly.map((row) => row.cells));
		expect(outcome.cutsOut).toBe(
			report.events.some(({ side, kind }) => side === 'discharge' && kind === 'cut')
		);
	});

	it('counts the dark hours to the end when the battery does not come back', () => {
		const dark = scenarioWith({ bms: { discharge: { cut: 45, reset: 30 }, autoReset: false } });
		const outcome = new OutcomeRunner().run(dark);
		const full = simulateScenario(dark);
		const cut = full.status === 'done' && full.report.events.find(({ side }) => side === 'discharge')!.hour;
		expect(outcome.darkHours).toBeCloseTo(6 + 19 - Number(cut), 9);
	});
});

describe('the spread of a day', () => {
	const spread = finishWork(spreadDay(EDGE, { samples: 64, seed: 3 }));

	it('gives the same digits for the same seed, and others for another', () => {
		expect(finishWork(spreadDay(EDGE, { samples: 64, seed: 3 }))).toEqual(spread);
		expect(finishWork(spreadDay(EDGE, { samples: 64, seed: 4 })).headroomMiddleK).not.toBe(
			spread.headroomMiddleK
		);
	});

	it('has its quantiles in order at every point, around the estimate', () => {
		const { lowC, lowerC, middleC, upperC, highC, stepMin } = spread.band;
		const full = simulateScenario(EDGE);
		if (full.status === 'failed') throw new Error(full.reason);
		lowC.forEach((low, at) => {
			expect([low, lowerC[at]!, middleC[at]!, upperC[at]!, highC[at]!]).toEqual(
				[low, lowerC[at]!, middleC[at]!, upperC[at]!, highC[at]!].sort((a, b) => a - b)
			);
			expect(full.minutes.nodes.cells[at * stepMin]).toBeGreaterThan(low - 0.01);
			expect(full.minutes.nodes.cells[at * stepMin]).toBeLessThan(highC[at]! + 0.01);
		});
	});

	it('counts the days that end in the dark, with an interval around the share', () => {
		expect(spread.cutOuts).toBeGreaterThan(8);
		expect(spread.cutOuts).toBeLessThan(56);
		expect(spread.cutOutShare).toBe(spread.cutOuts / 64);
		expect(spread.shareInterval.low).toBeLessThan(spread.cutOutShare);
		expect(spread.shareInterval.high).toBeGreaterThan(spread.cutOutShare);
		expect(spread.convergence.map(({ samples }) => samples)).toEqual([16, 32, 64]);
		expect(spread.convergence.at(-1)!.cutOutShare).toBe(spread.cutOutShare);
	});

	it('comes nearer to what many draws say the more are drawn', () => {
		const many = finishWork(spreadDay(EDGE, { samples: 256, seed: 8 })).headroomMiddleK;
		const offBy = (samples: number) =>
			[1, 2, 3, 4].reduce(
				(sum, seed) => sum + Math.abs(finishWork(spreadDay(EDGE, { samples, seed })).headroomMiddleK - many),
				0
			);
		expect(offBy(64)).toBeLessThan(offBy(8));
	});
});

describe('the hottest day', () => {
	it('is where the battery comes to go dark', () => {
		const runner = new OutcomeRunner();
		const limitC = findHottestDay(EDGE, runner, ({ cutsOut }) => !cutsOut, 0.01);
		const outcomeAt = (tMax: number) => runner.run({ ...EDGE, climate: { ...EDGE.climate, tMax } });
		expect(outcomeAt(limitC - 0.02).cutsOut).toBe(false);
		expect(outcomeAt(limitC + 0.02).cutsOut).toBe(true);
	});

	it('is beyond all that are tried where nothing gets hot, and below them where everything does', () => {
		const runner = new OutcomeRunner();
		expect(findHottestDay(EDGE, runner, () => true, 1)).toBe(Infinity);
		expect(findHottestDay(EDGE, runner, () => false, 1)).toBe(-Infinity);
	});
});

describe('cut-out days in a year', () => {
	const months = (meanMaxC: number) => Array.from({ length: 12 }, () => ({ meanMaxC, spreadK: 3 }));
	const countAt = (meanMaxC: number, days = 5) =>
		finishWork(
			countCutOutDays(
				EDGE,
				{ months: months(meanMaxC), daysOnRoad: Array(12).fill(days) as number[] },
				{ samples: 8, seed: 1 }
			)
		);

	it('are none in the cold, all in the furnace, and more the hotter in between', () => {
		expect(countAt(-30).year.high).toBeLessThan(1e-6);
		expect(countAt(90).year.low).toBeCloseTo(60, 6);
		expect(countAt(36).year.middle).toBeGreaterThan(countAt(32).year.middle);
	});

	it('come with ten equally likely vehicles, which keep the mean and their order', () => {
		const { year, tenths } = countAt(34);
		expect(tenths).toHaveLength(10);
		expect(tenths).toEqual([...tenths!].sort((a, b) => a - b));
		expect(tenths!.reduce((sum, days) => sum + days, 0) / 10).toBeCloseTo(year.middle, 9);
		expect(tenths![0]).toBeLessThanOrEqual(year.low);
		expect(tenths![9]).toBeGreaterThanOrEqual(year.high);
		expect(tenths![0]).toBeLessThan(tenths![9]!);
	});

	it('are in proportion to the days on the road, and add up over the months', () => {
		const { year, months: byMonth } = countAt(38);
		expect(countAt(38, 10).year.middle).toBeCloseTo(2 * year.middle, 9);
		expect(byMonth.reduce((sum, { middle }) => sum + middle, 0)).toBeCloseTo(year.middle, 9);
	});

	it('refuse a year without twelve months', () => {
		const short = { months: months(30).slice(1), daysOnRoad: Array(12).fill(1) as number[] };
		expect(() => finishWork(countCutOutDays(EDGE, short, { samples: 2, seed: 1 }))).toThrow('twelve months');
	});
});

describe('what matters most', () => {
	const { ranking, evaluations } = finishWork(
		rankInfluences(EDGE, { pointsEach: 16, replicates: 2, seed: 2 })
	);

	it('is ranked by the share of the variance, and leaves out what moves nothing here', () => {
		const effects = ranking.map(({ totalEffect }) => totalEffect);
		expect(effects).toEqual([...effects].sort((a, b) => b - a));
		expect(ranking.map(({ key }) => key)).not.toContain('shieldFinish');
		expect(evaluations).toBe(2 * 16 * (ranking.length + 2));
	});

	it('is the view of the exhaust on a hot side, not what the bonnet is painted', () => {
		const rankOf = (key: string) => ranking.findIndex((influence) => influence.key === key);
		expect(rankOf('exhaustView')).toBeLessThan(4);
		expect(rankOf('paint')).toBeGreaterThan(rankOf('exhaustView'));
	});
});
