import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	listRows,
	readBytes,
	readText,
	reportOf,
	type Row,
	SECONDS,
	secondsText,
	steadyRows,
	toBytes
} from '../../../../tests/support/trace-files';
import { CoveredSpans } from './covered-spans';

describe('rows out of order', () => {
	it('are put in order, and counted', () => {
		const rows: Row[] = [
			[0, 20],
			[3, 20.3],
			[1, 20.1],
			[2, 20.2],
			[4, 20.4]
		];
		expect(listRows(secondsText(rows)).map(([timeS]) => timeS)).toEqual([0, 1, 2, 3, 4]);
		expect(reportOf(rows).rows).toMatchObject({ kept: 5, moved: 2 });
	});

	it('are put in order up to a thousand rows late, however the pieces are cut', () => {
		const late: Row[] = [
			...steadyRows(500),
			[100.5, 20.2],
			...steadyRows(2000, 500),
			[1600.5, 20.2],
			...steadyRows(900, 2500)
		];
		const text = secondsText(late);
		expect(listRows(text).map(([timeS]) => timeS)).toEqual(
			late.map(([timeS]) => Number(timeS)).sort((a, b) => a - b)
		);
		expect(readBytes(toBytes(text), SECONDS, { pieceBytes: 97 })).toEqual(readText(text));
	});

	it('are kept where the days of a file stand the wrong way round', () => {
		const [first, second] = [steadyRows(3000), steadyRows(3000, 86_400)];
		const { trace, report } = readText(secondsText([...second, ...first]));
		expect(report.rows).toMatchObject({ kept: 6000, moved: 3000 });
		expect(trace).toEqual(readText(secondsText([...first, ...second])).trace);
		expect(report.gaps).toMatchObject({ count: 1, told: [{ fromS: 2999, toS: 86_400, line: 2 }] });
	});

	it('are dropped far back in a time that is covered, and counted', () => {
		const { rows } = reportOf([...steadyRows(4000), ...steadyRows(4000)]);
		expect(rows).toMatchObject({ read: 8000, kept: 4000, dropped: { alreadyCovered: 4000 } });
	});

	it('are kept where three parts stand in any order', () => {
		const parts = [steadyRows(2000), steadyRows(2000, 2000), steadyRows(2000, 4000)] as const;
		const { report } = readText(secondsText([...parts[2], ...parts[0], ...parts[1]]));
		expect(report.rows).toMatchObject({ kept: 6000, moved: 4000 });
		expect(report.gaps.count).toBe(0);
	});

	it('are dropped from where an earlier part runs into one that is there', () => {
		const { rows } = reportOf([...steadyRows(2000, 4000), ...steadyRows(1500, 3000)]);
		expect(rows).toMatchObject({ kept: 3000, dropped: { alreadyCovered: 500 } });
	});

	it('go on in a part that was left for a while, but not back into it', () => {
		const times = [10, 5, 11, 90_000, 12, 11.5, 7, 11.2, 5];
		const rows = times.map((timeS): Row => [timeS, 20]);
		const kept = listRows(secondsText(rows)).map(([timeS]) => timeS);
		expect(kept.sort((a, b) => a - b)).toEqual([5, 10, 11, 11.5, 12, 90_000]);
		expect(reportOf(rows).rows).toMatchObject({ kept: 6, moved: 3, dropped: { alreadyCovered: 3 } });
	});

	it('may have the newest first', () => {
		const rows = steadyRows(5000);
		const { trace, report } = readText(secondsText([...rows].reverse()));
		expect(report).toMatchObject({
			rows: { kept: 5000, moved: 4999 },
			medianIntervalS: 1,
			gaps: { count: 0 }
		});
		expect(trace).toEqual(readText(secondsText(rows)).trace);
	});

	it('are all kept, once each, whatever the order, where none is far from its place or all parts are apart', () => {
		const part = fc.integer({ min: 1, max: 400 });
		const shuffled = fc
			.array(part, { minLength: 1, maxLength: 8 })
			.chain((lengths) =>
				fc
					.shuffledSubarray([...lengths.keys()], { minLength: lengths.length })
					.map((order) => ({ lengths, order }))
			);
		fc.assert(
			fc.property(shuffled, ({ lengths, order }) => {
				const parts = lengths.map((length, at) => steadyRows(length, at * 1000));
				const { trace, report } = readText(
					secondsText([...order.flatMap((at) => parts[at]!), [9000, 20], [9001, 20]])
				);
				expect(report.rows.kept).toBe(report.rows.read);
				expect(trace).toEqual(readText(secondsText([...parts.flat(), [9000, 20], [9001, 20]])).trace);
			}),
			{ numRuns: 15, seed: 4 }
		);
	});

	it('are one where a single row has a clock gone wrong', () => {
		const { rows, gaps } = reportOf([...steadyRows(1500), [2_000_000, 20], ...steadyRows(1500, 1500)]);
		expect(rows).toMatchObject({ kept: 3001 });
		expect(gaps.told.map(({ fromS, toS }) => [fromS, toS])).toEqual([[2999, 2_000_000]]);
	});
});

describe('the same time twice', () => {
	it('keeps the first row, and tells the same values from others', () => {
		const rows: Row[] = [
			[0, 20],
			[1, 20.1],
			[1, 20.1],
			[1, 20.7],
			[2, 20.2],
			[2, '']
		];
		expect(listRows(secondsText(rows))).toEqual([
			[0, 20],
			[1, 20.1],
			[2, 20.2]
		]);
		const report = reportOf(rows);
		expect(report.rows.dropped).toMatchObject({ repeated: 1, repeatedDiffering: 2 });
		expect(
			report.findings.filter(({ reason }) => reason === 'repeatedDiffering').map(({ line }) => line)
		).toEqual([5, 7]);
	});
});

it('the first row may stand there again', () => {
	const { dropped } = reportOf([
		[5, 20],
		[5, 20],
		[5, 20.2],
		[6, 20]
	]).rows;
	expect(dropped).toMatchObject({ repeated: 1, repeatedDiffering: 1, alreadyCovered: 0 });
});

it.each([
	['days', 20, 3600],
	['hours at a fine step', 4000, 7],
	['what only just has room', 99_990, 1],
	['what has a bin too many', 100_020, 1]
])('bins do not depend on the order: %s', (_, count, stepS) => {
	const rows = steadyRows(count).map(([timeS, value]): Row => [Number(timeS) * stepS, value]);
	const middle = Math.floor(count / 2);
	const inOrder = readText(secondsText(rows)).trace;
	expect(readText(secondsText([...rows].reverse())).trace).toEqual(inOrder);
	expect(readText(secondsText([...rows.slice(middle), ...rows.slice(0, middle)])).trace).toEqual(inOrder);
});

describe('stretches of time', () => {
	it('are made one where they meet when the later one was there first', () => {
		const spans = new CoveredSpans();
		spans.openAt(100, 7).endS = 200;
		const earlier = spans.openAt(20, 9);
		earlier.endS = 60;
		expect([60, 61, 99, 100, 200, 201].map((timeS) => spans.covers(timeS))).toEqual([
			true,
			false,
			false,
			true,
			true,
			false
		]);
		expect(spans.nextStartS(earlier)).toBe(100);
		expect(spans.joinWithNext(earlier)).toEqual({ fromS: 60, toS: 100, line: 7 });
		expect(spans.list).toEqual([{ startS: 20, endS: 200, startLine: 9 }]);
	});

	it('stay apart over more than a minute', () => {
		const spans = new CoveredSpans();
		const [later, earlier] = [spans.openAt(121, 1), spans.openAt(60, 2)];
		expect([spans.joinWithNext(earlier), spans.joinWithNext(later)]).toEqual([null, null]);
		expect(spans.openAt(181, 3)).toBe(later);
		expect(spans.openAt(182, 4)).not.toBe(later);
	});
});

describe('gaps', () => {
	it('are longer than five median intervals, and told with their line', () => {
		const rows = [...steadyRows(100), ...steadyRows(100, 105), ...steadyRows(100, 300)].filter(
			([timeS]) => timeS !== 110
		);
		const { gaps, medianIntervalS } = reportOf(rows);
		expect(medianIntervalS).toBe(1);
		// From 99 to 105 and from 204 to 300; the one row that is missing is no gap.
		expect(gaps).toEqual({
			overS: 5,
			count: 2,
			told: [
				{ fromS: 99, toS: 105, line: 102 },
				{ fromS: 204, toS: 300, line: 201 }
			]
		});
	});

	it('are as long as one says', () => {
		const text = secondsText([...steadyRows(100), ...steadyRows(100, 103)]);
		expect(readText(text, SECONDS, { gapIntervals: 3 }).report.gaps.count).toBe(1);
		expect(readText(text, SECONDS, { gapIntervals: 4 }).report.gaps.count).toBe(0);
	});

	it('are all counted and the hundred longest told', () => {
		const rows: Row[] = [];
		for (let at = 0, timeS = 0; at < 150; at++, timeS += 40 + at) rows.push(...steadyRows(30, timeS));
		const { count, told } = reportOf(rows).gaps;
		expect([count, told.length]).toEqual([149, 100]);
		expect(told[0]!.toS - told[0]!.fromS).toBe(12 + 49);
	});
});
