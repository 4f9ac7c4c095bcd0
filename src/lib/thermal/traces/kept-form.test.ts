import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	minutesTrace,
	noiseAt,
	readText,
	refusalOf,
	SECONDS,
	secondsText
} from '../../../../tests/support/trace-files';
import { EngineInputError } from '../correlations/require';
import { BIN_STEPS_S, coarsenTrace, endOf, minuteBins, MOST_BINS, type BinnedTrace } from './binned-trace';
import { decodeTrace, encodeTrace } from './trace-code';
import { TraceView } from './trace-view';

type Row = readonly [number, number];
const rowsOf = (count: number, stepS: number): Row[] =>
	Array.from({ length: count }, (_, at) => [
		Math.round(at * stepS * 1000) / 1000,
		Math.round((25 + 3 * noiseAt(at)) * 100) / 100
	]);
const traceOf = (rows: readonly Row[]): BinnedTrace => readText(secondsText(rows)).trace;

/** What the bins must be, reckoned the plain way. */
function binPlainly(rows: readonly Row[], stepS: number): Map<number, number[]> {
	const bins = new Map<number, number[]>();
	for (const [timeS, value] of rows) {
		const bin = Math.floor(timeS / stepS + 1e-9);
		bins.set(bin, [...(bins.get(bin) ?? []), value]);
	}
	return bins;
}

function expectBins({ channels, stepS }: BinnedTrace, rows: readonly Row[]): void {
	const { count, mean, min, max } = channels.cellC!;
	const plain = binPlainly(rows, stepS);
	expect(count.reduce((a, b) => a + b, 0)).toBe(rows.length);
	count.forEach((values, bin) => {
		const expected = plain.get(bin) ?? [];
		expect(values).toBe(expected.length);
		if (values === 0) return;
		expect(min[bin]).toBe(Math.fround(Math.min(...expected)));
		expect(max[bin]).toBe(Math.fround(Math.max(...expected)));
		expect(mean[bin]).toBeCloseTo(expected.reduce((a, b) => a + b, 0) / values, 4);
	});
}

describe('bins', () => {
	it.each([
		[0.1, 0.1],
		[0.25, 0.5],
		[1, 1],
		[2, 5],
		[10, 15],
		[60, 60],
		[600, 60]
	])('of rows every %d s are %d s long, and hold what a plain reckoning says', (intervalS, stepS) => {
		const rows = rowsOf(500, intervalS);
		const trace = traceOf(rows);
		expect(trace.stepS).toBe(stepS);
		expectBins(trace, rows);
	});

	it('of tenths of a second since 1970 hold one row each, however the times are rounded', () => {
		const text = Array.from({ length: 600 }, (_, at) => `${(1_769_868_000 + at / 10).toFixed(1)},20\n`).join(
			''
		);
		const { trace } = readText(text, { ...SECONDS, time: { kind: 'epoch-s', column: 1 } });
		expect([trace.stepS, trace.binCount]).toEqual([0.1, 600]);
		expect([...trace.channels.cellC!.count].every((count) => count === 1)).toBe(true);
	});

	it('become longer when there would be too many', () => {
		const rows = rowsOf(3, 1).concat(rowsOf(3, 1).map(([timeS, value]) => [timeS + 200_000, value]));
		const trace = traceOf(rows);
		expect(trace.stepS).toBe(5);
		expect(trace.binCount).toBeLessThanOrEqual(MOST_BINS);
		expectBins(trace, rows);
	});

	it('begin on a whole minute, also where an earlier part comes later in the file', () => {
		const late = rowsOf(50, 1).map(([timeS, value]): Row => [timeS + 10_000, value]);
		const early = rowsOf(50, 1).map(([timeS, value]): Row => [timeS + 30, value]);
		const trace = traceOf([...late, ...early]);
		expect(trace.startS).toBe(0);
		expectBins(trace, [...early, ...late]);
	});

	it('join into minutes as if they had been minutes from the start', () => {
		const rows = rowsOf(2000, 1);
		const minutes = minuteBins(traceOf(rows));
		expect([minutes.stepS, minutes.binCount]).toEqual([60, 34]);
		expectBins(minutes, rows);
	});

	it('join any whole number of each, and no other', () => {
		const trace = minutesTrace({ cellC: [1, 2, NaN, 4, 5] });
		const { cellC } = coarsenTrace(trace, 120).channels;
		expect([...cellC!.count]).toEqual([2, 1, 1]);
		expect([...cellC!.mean]).toEqual([1.5, 4, 5]);
		expect(() => coarsenTrace(trace, 90)).toThrow(EngineInputError);
		expect(() => coarsenTrace(trace, 30)).toThrow('stepS');
	});

	it('each are a whole number of the ones before', () => {
		const factors = BIN_STEPS_S.slice(1).map((step, at) => step / BIN_STEPS_S[at]!);
		expect(factors.every((factor) => Number.isInteger(Math.round(factor * 1e9) / 1e9))).toBe(true);
	});
});

describe('a look at any part of a trace', () => {
	const values = Array.from({ length: 5000 }, (_, at) => (at % 911 === 0 ? NaN : 40 + 10 * noiseAt(at)));
	const trace = minutesTrace({ cellC: values });
	const view = new TraceView(trace);

	it('takes at most so many points, and the band holds every value', () => {
		fc.assert(
			fc.property(
				...([
					fc.integer({ min: -100, max: 5100 }),
					fc.integer({ min: 1, max: 5300 }),
					fc.integer({ min: 1, max: 700 })
				] as const),
				(first, length, mostPoints) => {
					const curve = view.curve('cellC', first * 60, (first + length) * 60, mostPoints);
					expect(curve.mean.length).toBeLessThanOrEqual(mostPoints);
					const beginS = curve.timeS[0]! - curve.stepS / 2;
					const outside: number[] = [];
					for (let at = Math.max(first, 0); at < Math.min(first + length, values.length); at++) {
						if (Number.isNaN(values[at]!)) continue;
						const point = Math.floor((at * 60 + 30 - beginS) / curve.stepS);
						const [value, mean] = [Math.fround(values[at]!), curve.mean[point]!];
						const holds = (each: number) => curve.min[point]! <= each && each <= curve.max[point]!;
						if (!holds(value) || !holds(mean)) outside.push(at);
					}
					expect(outside).toEqual([]);
				}
			),
			{ numRuns: 60, seed: 3 }
		);
	});

	it('is as fine as it can be', () => {
		expect(view.curve('cellC', 0, 100 * 60, 100).stepS).toBe(60);
		expect(view.curve('cellC', 0, 100 * 60, 99).stepS).toBe(120);
		expect(view.curve('cellC', 0, endOf(trace), 1).mean.length).toBe(1);
	});

	it('is empty where the trace is not, and not known where nothing was measured', () => {
		expect(view.curve('cellC', -600, 0, 10).mean.length).toBe(0);
		expect(view.curve('cellC', endOf(trace), endOf(trace) + 60, 10).mean.length).toBe(0);
		expect(view.curve('cellC', 911 * 60, 912 * 60, 10).mean[0]).toBeNaN();
	});

	it.each([
		['a channel that is not there', () => view.curve('caseC', 0, 60, 10)],
		['no time', () => view.curve('cellC', 60, 60, 10)],
		['no points', () => view.curve('cellC', 0, 60, 0)],
		['half a point', () => view.curve('cellC', 0, 60, 1.5)]
	])('refuses %s', (_, look) => {
		expect(look).toThrow(EngineInputError);
	});
});

describe('the bytes of a kept trace', () => {
	const time = {
		kind: 'calendar',
		column: 1,
		clockColumn: null,
		order: 'ymd',
		timeZone: 'Australia/Darwin'
	} as const;
	const columns = [
		{ column: 2, channel: 'cellC', unit: '°C' },
		{ column: 3, channel: 'currentA', unit: 'A' }
	] as const;
	const text = Array.from({ length: 300 }, (_, at) => {
		const clock = `${String(Math.floor(at / 60)).padStart(2, '0')}:${String(at % 60).padStart(2, '0')}`;
		return `2026-01-31 14:${clock},${at % 7 === 0 ? '' : 20 + noiseAt(at)},${noiseAt(at + 9)}\n`;
	}).join('');
	const fine = readText(text, { ...SECONDS, time, columns: [...columns] }).trace;

	it.each([
		['one value a bin', fine],
		['many values a bin', minuteBins(fine)],
		['whole minutes', minutesTrace({ ambientC: [1, NaN, 3] })]
	])('give the same trace again: %s', (_, trace) => {
		expect(decodeTrace(encodeTrace(trace))).toEqual(trace);
	});

	it('are few', () => {
		const trace = minutesTrace({ cellC: Array.from({ length: 1000 }, (_, at) => at) });
		expect(encodeTrace(trace).byteLength).toBeLessThan(6000 + 200);
	});

	it('show every damage', () => {
		const code = new Uint8Array(encodeTrace(minuteBins(fine)));
		for (let at = 0; at < code.length; at++) {
			const damaged = code.slice();
			damaged[at]! ^= 1 << (at % 8);
			expect(refusalOf(() => decodeTrace(damaged.buffer)).code).toBe('wrong_code');
		}
		for (let length = 0; length < code.length; length++) {
			expect(refusalOf(() => decodeTrace(code.slice(0, length).buffer)).code).toBe('wrong_code');
		}
		expect(refusalOf(() => decodeTrace(Uint8Array.from([...code, 0]).buffer)).code).toBe('wrong_code');
	});

	it('of another version, or with a head that cannot be, are refused though their checksum is right', () => {
		const trace = minutesTrace({ cellC: [1, 2] });
		const broken: Partial<BinnedTrace>[] = [
			{ stepS: 7 as never },
			{ binCount: 0 },
			{ binCount: 3 },
			{ binCount: 1 },
			{ startS: 30 },
			{ timeBase: 'moon' as never },
			{ timeZone: 5 as never },
			{ channels: {} }
		];
		for (const change of broken) {
			expect(refusalOf(() => decodeTrace(encodeTrace({ ...trace, ...change }))).code).toBe('wrong_code');
		}
		const none = minutesTrace({ cellC: [] });
		expect(refusalOf(() => decodeTrace(encodeTrace(none))).value).toBe('a head that cannot be');
		const other = new Uint8Array(encodeTrace(trace));
		other[4] = 2;
		expect(refusalOf(() => decodeTrace(other.buffer)).value).toBe('version 2');
	});
});
