import { describe, expect, it } from 'vitest';
import { EngineInputError } from '../correlations/require';
import type { Scenario } from '../types';
import { copyScenario } from '../uncertainty/draw-scenario';
import { finishWork } from '../uncertainty/finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import { runScenario } from '../vehicle/simulate';
import type { CapacityTest } from './capacity-tests';
import { toReferenceTemperature } from './capacity-tests';
import { projectCapacity } from './capacity-trend';
import type { CutOutReport } from './cut-out-report';
import { learnFrom } from './learn';
import { rankOtherCauses, type Moment } from './other-causes';
import { weighReading, type FieldReading } from './readings';
import { weighHeat } from './was-it-heat';
import { drawAgain, effectiveCount, weightedMean, weightedQuantile } from './weighted';

/** Ten hours of driving behind the exhaust on a hot day, then camp: the day on which batteries go dark at dusk. */
const LONG_DRIVE: Scenario = parseScenario({
	position: {
		bayAirFraction: 0.9,
		exhaustView: 0.02,
		engineView: 0.08,
		airExposure: 0.1,
		guardFraction: 0.9
	},
	bms: { charge: { cut: 60, reset: 55 }, discharge: { cut: 63.2, reset: 58 } },
	start: { hour: 7, soc: 0.6 },
	legs: [
		{ minutes: 240, engineOn: true, speedKmh: 85, loadA: 4 },
		{ minutes: 30, loadA: 6 },
		{ minutes: 345, engineOn: true, speedKmh: 70, surface: 'gravel', loadA: 4 },
		{ minutes: 720, loadA: 8 }
	]
});
const DRAWS = { samples: 128, seed: 1 };

/** When the battery goes dark and comes back on the day as estimated. */
function estimatedTimes(scenario: Scenario): { dark: number; back: number } {
	const run = runScenario(scenario);
	if (run.status === 'failed') throw new Error(run.reason);
	const [cut, reset] = run.report.events.filter(({ side }) => side === 'discharge');
	return { dark: cut!.hour, back: reset!.hour };
}

const ask = (report: CutOutReport, scenario = LONG_DRIVE) => finishWork(weighHeat(scenario, report, DRAWS));
const TIMES = estimatedTimes(LONG_DRIVE);

describe('was it heat?', () => {
	it('yes: after a long day’s drive it goes dark late in the afternoon while the air is getting cooler, and is back some two hours later', () => {
		expect(TIMES.dark).toBeGreaterThan(15);
		expect(TIMES.dark).toBeLessThan(18.5);
		expect(TIMES.back - TIMES.dark).toBeGreaterThan(1);
		expect(TIMES.back - TIMES.dark).toBeLessThan(3.5);
		const cause = ask({ wentDarkHour: TIMES.dark, cameBackHour: TIMES.dark + 2, withinHours: 0.75 });
		expect(cause.finding).toBe('explained');
		expect(cause.drivenHours).toBeGreaterThan(8);
		expect(cause.drivenHours).toBeLessThan(12);
		expect(cause.airFalling).toBe(true);
		expect(cause.bothShare).toBeGreaterThan(0);
	});

	it('no: dark in the small hours, when the heat is long gone', () => {
		const cause = ask({ wentDarkHour: 28, cameBackHour: 29, withinHours: 0.5 });
		expect(cause.finding).toBe('not-explained');
		expect(cause.bothShare).toBe(0);
	});

	it('no: at the right time but back after ten minutes, for cells do not cool so fast', () => {
		const cause = ask({ wentDarkHour: TIMES.dark, cameBackHour: TIMES.dark + 1 / 6, withinHours: 0.05 });
		expect(cause.heatProbability).toBeLessThan(0.2);
		expect(cause.otherCauses.map(({ key }) => key).indexOf('overcurrent')).toBeLessThan(2);
	});

	it('no: on a cool day', () => {
		const cool = copyScenario(LONG_DRIVE);
		cool.climate.tMax = 18;
		const cause = ask({ wentDarkHour: TIMES.dark, cameBackHour: TIMES.dark + 2, withinHours: 0.75 }, cool);
		expect(cause.heatProbability).toBeLessThan(0.2);
		expect(cause.darkShare).toBeLessThan(0.1);
	});

	it('is asked by the time alone when nobody knows when it came back', () => {
		const cause = ask({ wentDarkHour: TIMES.dark, cameBackHour: null, withinHours: 0.75 });
		expect(cause.bothShare).toBe(cause.whenShare);
	});

	it('does not say yes by the one draw in hundreds that happens to come near, whatever the seed', () => {
		const cooler = copyScenario(LONG_DRIVE);
		cooler.climate.tMax = 26;
		const report = { wentDarkHour: TIMES.dark, cameBackHour: TIMES.dark + 2, withinHours: 0.5 };
		const causes = Array.from({ length: 12 }, (_, at) =>
			finishWork(weighHeat(cooler, report, { samples: 64, seed: 16 + at }))
		);
		// The first draws left it open, so that eight times as many were made; where none came near, they were enough.
		expect(new Set(causes.map(({ samples }) => samples))).toEqual(new Set([64, 512]));
		expect(Math.max(...causes.map(({ heatProbability }) => heatProbability))).toBeGreaterThan(0.8);
		expect(causes.map(({ finding }) => finding)).not.toContain('explained');
	});

	it('has the same digits for the same seed', () => {
		const report = { wentDarkHour: 17, cameBackHour: 19, withinHours: 0.5 };
		expect(ask(report)).toEqual(ask(report));
	});

	it.each([
		['back before it went dark', { wentDarkHour: 17, cameBackHour: 16, withinHours: 0.5 }, 'cameBackHour'],
		['times known exactly', { wentDarkHour: 17, cameBackHour: 18, withinHours: 0 }, 'withinHours'],
		['before the day began', { wentDarkHour: -1, cameBackHour: null, withinHours: 1 }, 'wentDarkHour']
	])('refuses a report: %s', (_, report, input) => {
		expect(() => ask(report)).toThrow(EngineInputError);
		expect(() => ask(report)).toThrow(input);
	});
});

describe('the other causes', () => {
	const moment: Moment = {
		...{ soc: 0.6, currentA: -8, capacityAh: 100, cellsC: 35, ambientC: 30, darkHours: 2, engineOn: false }
	};
	it.each([
		['an empty battery', { soc: 0.04 }, 'low-voltage'],
		['a large load', { currentA: -90 }, 'overcurrent'],
		['a full one on the charger', { soc: 0.99, currentA: 12, engineOn: true }, 'cell-imbalance'],
		['a morning below freezing', { cellsC: -3 }, 'cold']
	])('begin with what fits %s', (_, change, key) => {
		expect(rankOtherCauses({ ...moment, ...change })[0]!.key).toBe(key);
	});
});

describe('draws by weight', () => {
	it('count as many as they are when equal, and one when one has all', () => {
		expect(effectiveCount([0.2, 0.2, 0.2, 0.2])).toBeCloseTo(4, 12);
		expect(effectiveCount([0, 3, 0])).toBe(1);
		expect(effectiveCount([0, 0])).toBe(0);
	});

	it('have a mean and quantiles', () => {
		expect(weightedMean([1, 3], [3, 1])).toBe(1.5);
		expect(weightedQuantile([5, 1, 3], [1, 1, 2], 0.5)).toBe(3);
		expect(weightedQuantile([5, 1, 3], [1, 0, 0], 0.05)).toBe(5);
	});

	it('are drawn again as often as they weigh', () => {
		expect(drawAgain([1, 0, 3], 4)).toEqual([0, 2, 2, 2]);
		expect(drawAgain([1, 1, 1], 3)).toEqual([0, 1, 2]);
	});
});

describe('a reading in the field', () => {
	const label: FieldReading = { kind: 'peak-label', place: 'case', turnedC: 60, notTurnedC: 65, withinK: 1 };
	const withPeak = (peakC: number) => weighReading(label, { spans: [], peakC, tempC: NaN });

	it('of a label fits peaks between the two fields and no others', () => {
		expect(withPeak(62.5)).toBeGreaterThan(0.99);
		expect(withPeak(55)).toBeLessThan(1e-6);
		expect(withPeak(70)).toBeLessThan(1e-6);
	});

	it('of a thermometer fits best what it shows', () => {
		const read = (tempC: number) =>
			weighReading(
				{ kind: 'thermometer', place: 'cells', hour: 12, tempC: 50, withinK: 2 },
				{ spans: [], peakC: 0, tempC }
			);
		expect(read(50)).toBe(1);
		expect(read(49)).toBeCloseTo(read(51), 12);
		expect(read(NaN)).toBe(0);
	});
});

describe('one number teaches', () => {
	const YEAR = { months: Array(12).fill({ meanMaxC: 30, spreadK: 4 }), daysOnRoad: Array(12).fill(3) };
	const learn = (...readings: FieldReading[]) =>
		finishWork(
			learnFrom(
				LONG_DRIVE,
				readings.map((reading) => ({ scenario: LONG_DRIVE, reading })),
				YEAR,
				{ samples: 128, yearSamples: 8, seed: 3 }
			)
		);
	const label = (turnedC: number | null, notTurnedC: number | null): FieldReading => ({
		...{ kind: 'peak-label', place: 'case', turnedC, notTurnedC, withinK: 1 }
	});

	it('a label that stayed cool means fewer dark days, one that went hot means more', () => {
		const cool = learn(label(null, 66));
		const hot = learn(label(71, null));
		expect(cool.fits && hot.fits).toBe(true);
		expect(cool.after.year.year.middle).toBeLessThan(cool.before.year.year.middle);
		expect(hot.after.year.year.middle).toBeGreaterThan(hot.before.year.year.middle);
		expect(cool.after.headroomMiddleK).toBeGreaterThan(hot.after.headroomMiddleK);
	});

	it('narrows what is held possible, and names what it told of', () => {
		const { before, after, unknowns } = learn(label(66, 71));
		const widthOf = ({ headroomLowK, headroomHighK }: typeof before) => headroomHighK - headroomLowK;
		expect(widthOf(after)).toBeLessThan(widthOf(before));
		expect(unknowns.length).toBeGreaterThan(0);
		expect(unknowns.every(({ key }) => key !== 'dayMax')).toBe(true);
	});

	it('two readings narrow it further than one', () => {
		const one = learn(label(66, 71));
		const two = learn(label(60, 65), {
			kind: 'thermometer',
			place: 'case',
			hour: 16,
			tempC: 62,
			withinK: 1.5
		});
		expect(two.effectiveSamples).toBeLessThan(one.effectiveSamples);
	});

	it('learns nothing from what the model holds impossible, and says so', () => {
		const { fits, before, after, unknowns } = learn(label(140, null));
		expect(fits).toBe(false);
		expect(after).toEqual(before);
		expect(unknowns).toEqual([]);
	});

	it('refuses a label on which nothing was read, or whose fields are the wrong way round', () => {
		expect(() => learn(label(null, null))).toThrow(EngineInputError);
		expect(() => learn(label(71, 65))).toThrow('notTurnedC');
	});
});

describe('capacity tests', () => {
	const test = (years: number, capacityAh: number, tempC = 25): CapacityTest => ({
		...{ years, capacityAh, currentA: 5, cutOffV: 10.8, tempC }
	});
	const project = (...tests: CapacityTest[]) =>
		projectCapacity(tests, 100, { isLeadAcid: false, namedAh: 60 });

	it('are brought to 25 °C for lead-acid, slow and fast, and left alone for lithium', () => {
		expect(toReferenceTemperature(test(0, 94, 15), true)).toBeCloseTo(100, 10);
		expect(toReferenceTemperature({ ...test(0, 45, 15), currentA: 40 }, true)).toBeCloseTo(50, 10);
		expect(toReferenceTemperature(test(0, 94, 15), false)).toBe(94);
	});

	it('that fall by as much each year are told from a square root', () => {
		const trend = project(...[0, 1, 2, 3, 4, 5, 6].map((years) => test(years, 100 - 5 * years)));
		expect(trend.honest).toBe('linear');
		expect(trend.toldByTests).toBe(true);
		const { toEightyPercent } = trend.projections[0]!;
		expect(toEightyPercent.middle).toBeGreaterThan(3.7);
		expect(toEightyPercent.middle).toBeLessThan(4.3);
		expect(toEightyPercent.low!).toBeLessThan(toEightyPercent.middle!);
		expect(toEightyPercent.high!).toBeGreaterThan(toEightyPercent.middle!);
	});

	it('that fall with the square root of time are told from a straight line', () => {
		const trend = project(
			...[0, 0.25, 1, 2, 4, 6, 9].map((years) => test(years, 100 - 10 * Math.sqrt(years)))
		);
		expect(trend.honest).toBe('square-root');
		expect(trend.toldByTests).toBe(true);
		expect(trend.projections[1]!.toEightyPercent.middle).toBeCloseTo(4, 0);
	});

	it('that are too few to tell are gone by carefully: the law that comes to 80 % first', () => {
		const trend = project(test(1, 95));
		expect(trend.toldByTests).toBe(false);
		const [linear, root] = trend.projections;
		expect(trend.honest).toBe('linear');
		expect(linear!.toEightyPercent.middle!).toBeLessThan(root!.toEightyPercent.middle ?? Infinity);
	});

	it('give the years to a capacity that was named, later than to 80 % when it is lower', () => {
		const { projections } = project(test(1, 94), test(2, 88), test(3, 82));
		expect(projections[0]!.toNamed!.middle!).toBeGreaterThan(projections[0]!.toEightyPercent.middle!);
	});

	it('of a battery that has lost nothing leave the end open', () => {
		const { projections } = project(test(1, 100), test(2, 100), test(3, 100));
		expect(projections[0]!.toEightyPercent.high).toBeNull();
	});

	it('are refused when they cannot be', () => {
		expect(() => project()).toThrow('tests');
		expect(() => project(test(-1, 90))).toThrow('years');
		expect(() => project(test(1, 0))).toThrow('capacityAh');
		expect(() => project(test(1, 90, 80))).toThrow('tempC');
	});
});
