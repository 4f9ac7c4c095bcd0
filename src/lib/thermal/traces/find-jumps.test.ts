import { describe, expect, it } from 'vitest';
import { emptyBins, type BinnedTrace } from './binned-trace';
import type { TraceChannel } from './channels';
import { findJumps } from './find-jumps';

/** A trace of a value a minute; NaN where nothing was measured. */
function traceOf(channel: TraceChannel, values: readonly number[]): BinnedTrace {
	const bins = emptyBins(values.length);
	values.forEach((value, at) => {
		if (Number.isNaN(value)) return;
		bins.count[at] = 1;
		for (const of of [bins.mean, bins.min, bins.max]) of[at] = value;
	});
	const base = { timeBase: 'elapsed', timeZone: null, startS: 600, stepS: 60 } as const;
	return { ...base, binCount: values.length, channels: { [channel]: bins } };
}

const warming = (minutes: number): number[] => Array.from({ length: minutes }, (_, at) => 30 + at / 10);
/** The same with other values from a minute on. */
const withValues = (from: number, values: readonly number[]): number[] => {
	const all = warming(60);
	all.splice(from, values.length, ...values);
	return all;
};

describe('stretches that no thermometer can have measured', () => {
	it('are marked from the jump until it is back, with how far off they were', () => {
		const [pulled, ...more] = findJumps(traceOf('cellC', withValues(20, [95, 95, 96, 94])));
		expect(more).toEqual([]);
		expect(pulled).toMatchObject({
			channel: 'cellC',
			fromS: 600 + 20 * 60,
			toS: 600 + 24 * 60,
			stays: false
		});
		expect(pulled!.offK).toBeCloseTo(96 - 31.9, 4);
	});

	it('are marked when they fall back slowly, as a sensor does that was heated', () => {
		const heated = [60, 90, 75, 60, 50, 42, 38];
		expect(findJumps(traceOf('caseC', withValues(20, heated)))).toMatchObject([
			{ fromS: 600 + 20 * 60, toS: 600 + 27 * 60 }
		]);
	});

	it('are found over a silence, and more than one of them', () => {
		const values = withValues(20, [NaN, 90, 90, NaN, ...warming(60).slice(24, 40), 5, 5]);
		expect(findJumps(traceOf('ambientC', values)).map(({ fromS, toS }) => [fromS, toS])).toEqual([
			[600 + 21 * 60, 600 + 24 * 60],
			[600 + 40 * 60, 600 + 42 * 60]
		]);
	});

	it('are the step alone where it never comes back', () => {
		const values = warming(60).map((value, at) => (at < 20 ? value : value + 25));
		expect(findJumps(traceOf('cellC', values))).toMatchObject([
			{ fromS: 600 + 20 * 60, toS: 600 + 21 * 60, stays: true, offK: expect.closeTo(25.1, 3) as number }
		]);
	});

	it('are not what a bay, a shield or a current does, nor what rose while nothing was measured', () => {
		const soak = withValues(20, [60, 90, 70, 60]);
		expect(findJumps(traceOf('bayAirC', soak))).toEqual([]);
		expect(
			findJumps(
				traceOf(
					'exhaustShieldC',
					soak.map((value) => 4 * value)
				)
			)
		).toEqual([]);
		expect(findJumps(traceOf('currentA', soak))).toEqual([]);
		const silent = withValues(20, [NaN, NaN, NaN, NaN, NaN, ...Array<number>(35).fill(60)]);
		expect(findJumps(traceOf('cellC', silent))).toEqual([]);
	});
});
