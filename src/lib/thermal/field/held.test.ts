import { describe, expect, it } from 'vitest';
import { EngineInputError } from '../correlations/require';
import { finishWork } from '../uncertainty/finish-work';
import { parseScenario } from '../vehicle/parse-scenario';
import { holdCapacity, holdLabel } from './held-against';
import { holdDays, tenVehicles } from './held-days';
import { spreadPeak } from './peak-spread';

const SPREAD = { samples: 64, seed: 1, lowC: 55, middleC: 60, highC: 66, sdK: 3.5 };
const label = (turnedC: number | null, notTurnedC: number | null) =>
	({ kind: 'peak-label', place: 'case', turnedC, notTurnedC, withinK: 1.5 }) as const;

describe('a label held against the estimate', () => {
	it('is read in the middle of its two fields, and its error is measured less predicted', () => {
		const held = holdLabel(label(65, 70), SPREAD);
		expect(held).toMatchObject({ measured: 67.5, predicted: 60, error: 7.5, stand: 'above' });
		// √(3.5² + (1.5/1.6449)² + 5²/12) = 3.893
		expect(held.deviations).toBeCloseTo(7.5 / 3.893, 2);
	});

	it('widens the band by what the label leaves open, and by no more', () => {
		const held = holdLabel(label(60, 65), SPREAD);
		expect(held.high).toBeGreaterThan(66);
		expect(held.high).toBeLessThan(67);
		expect(held.low).toBeLessThan(55);
		expect(held.stand).toBe('inside');
	});

	it.each([
		['a field that turned below the prediction gainsays nothing', label(50, null), 0, 'inside'],
		['a field that turned far above it does', label(80, null), 5.5, 'above'],
		['a field that has not turned above it gainsays nothing', label(null, 75), 0, 'inside'],
		['one that has not turned far below it does', label(null, 45), -4.1, 'below']
	])('says one side only: %s', (_, reading, deviations, stand) => {
		const held = holdLabel(reading, SPREAD);
		expect(held).toMatchObject({ measured: null, error: null, stand });
		expect(held.deviations).toBeCloseTo(deviations, 0);
	});

	it('cannot be where nothing was read', () => {
		expect(() => holdLabel(label(null, null), SPREAD)).toThrow(EngineInputError);
	});
});

describe('the spread of a peak', () => {
	const day = parseScenario({
		legs: [
			{ minutes: 120, engineOn: true, speedKmh: 60 },
			{ minutes: 60, engineOn: false }
		]
	});
	const spreadOf = (seed: number) => finishWork(spreadPeak(day, 'case', { samples: 64, seed }));

	it('is the same for the same seed, in order, and about two standard deviations to each edge', () => {
		const spread = spreadOf(3)!;
		expect(spreadOf(3)).toEqual(spread);
		expect(spreadOf(4)).not.toEqual(spread);
		expect(spread.lowC).toBeLessThan(spread.middleC);
		expect(spread.middleC).toBeLessThan(spread.highC);
		const edges = (spread.highC - spread.lowC) / spread.sdK;
		expect(edges).toBeGreaterThan(2.6);
		expect(edges).toBeLessThan(4);
	});

	it('is hotter on a hotter day', () => {
		const hotter = { ...day, climate: { ...day.climate, tMax: day.climate.tMax + 5 } };
		const hot = finishWork(spreadPeak(hotter, 'case', { samples: 64, seed: 3 }))!;
		expect(hot.middleC).toBeGreaterThan(spreadOf(3)!.middleC + 2);
	});
});

describe('a capacity test held against the ageing band', () => {
	const BAND = [
		{ years: 1, low: 0.92, middle: 0.96, high: 0.98 },
		{ years: 2, low: 0.88, middle: 0.93, high: 0.97 }
	];

	it('meets the band in a straight line between two years, and from full when new', () => {
		expect(holdCapacity(0.945, 1.5, BAND)).toMatchObject({ stand: 'inside', low: 0.9, high: 0.975 });
		expect(holdCapacity(1, 0, BAND)).toMatchObject({ predicted: 1, error: 0, stand: 'inside' });
		expect(holdCapacity(0.97, 0.5, BAND)!.predicted).toBeCloseTo(0.98, 10);
	});

	it('says above and below, with the error in shares', () => {
		expect(holdCapacity(0.8, 2, BAND)).toMatchObject({ stand: 'below' });
		expect(holdCapacity(0.8, 2, BAND)!.error).toBeCloseTo(-0.13, 10);
		expect(holdCapacity(0.99, 2, BAND)!.stand).toBe('above');
	});

	it('is held against nothing beyond the last year', () => {
		expect(holdCapacity(0.8, 2.1, BAND)).toBeNull();
	});
});

describe('reported days held against stated ones', () => {
	it('state the chance of one day at least by Poisson’s law where all vehicles are alike', () => {
		expect(holdDays(0, [0.5, 0.5]).chance).toBeCloseTo(1 - Math.exp(-0.5), 9);
	});

	it('state a lower chance for the same mean where vehicles differ: the few bad ones take most days', () => {
		const held = holdDays(0, [0, 0, 0, 4]);
		expect(held.predicted).toBe(1);
		expect(held.chance).toBeCloseTo((1 - Math.exp(-4)) / 4, 9);
	});

	it('are no surprise where nothing was stated and nothing happened, and one where it did', () => {
		expect(Math.abs(holdDays(0, [0]).deviations)).toBeLessThan(0.01);
		expect(holdDays(0, [0])).toMatchObject({ stand: 'inside', low: 0, high: 0, chance: 0 });
		expect(holdDays(2, [0]).deviations).toBeGreaterThan(4);
		expect(holdDays(2, [0]).stand).toBe('above');
	});

	it('are few or many by the counts that hold nine of ten', () => {
		const held = holdDays(4, [4]);
		expect(held).toMatchObject({ low: 1, high: 8, stand: 'inside', error: 0 });
		expect(holdDays(0, [4]).stand).toBe('below');
		expect(holdDays(9, [4]).stand).toBe('above');
		expect(Math.abs(held.deviations)).toBeLessThan(0.2);
		expect(holdDays(3_000, [3_000]).deviations).toBeCloseTo(0, 1);
	});

	it('cannot be below nothing, nor of no vehicle', () => {
		expect(() => holdDays(-1, [1])).toThrow(EngineInputError);
		expect(() => holdDays(0, [])).toThrow(EngineInputError);
	});
});

describe('ten vehicles for a mean and a range', () => {
	const meanOf = (days: readonly number[]): number => days.reduce((sum, each) => sum + each, 0) / 10;

	it.each([
		['in the middle', { low: 1, middle: 3, high: 5 }],
		['near the low end', { low: 0, middle: 0.5, high: 5 }],
		['above the high end', { low: 0, middle: 1, high: 0.2 }],
		['of nothing', { low: 0, middle: 0, high: 0 }]
	])('keep the mean %s, and their order', (_, stated) => {
		const days = tenVehicles(stated);
		expect(days).toHaveLength(10);
		expect(meanOf(days)).toBeCloseTo(stated.middle, 12);
		expect(days).toEqual([...days].sort((a, b) => a - b));
		expect(days[0]).toBeGreaterThanOrEqual(0);
	});
});
