import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	listRows,
	readBytes,
	readText,
	refusalOf,
	SECONDS,
	secondsText,
	toBytes
} from '../../../../tests/support/trace-files';
import type { TraceMapping } from './mapping';
import { LONGEST_TRACE_S, MOST_TRACE_BYTES } from './reading-types';
import { TraceReader } from './read-trace';
import type { TraceReport } from './trace-report';

type Row = readonly [number | string, number | string];
const steady = (count: number, from = 0): Row[] =>
	Array.from({ length: count }, (_, at) => [from + at, 20 + (at % 5) / 10]);
const reportOf = (rows: readonly Row[]): TraceReport => readText(secondsText(rows)).report;
const sum = (counts: Record<string, number>): number => Object.values(counts).reduce((a, b) => a + b, 0);

/** Everything that went in is somewhere. */
function expectWhole({ lines, rows, cells }: TraceReport): void {
	expect(lines.before + lines.blank + lines.comments + rows.read).toBe(lines.total);
	expect(rows.kept + sum(rows.dropped)).toBe(rows.read);
	for (const counts of Object.values(cells)) expect(sum(counts)).toBe(rows.timed);
}

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
			...steady(500),
			[100.5, 20.2],
			...steady(2000, 500),
			[1600.5, 20.2],
			...steady(900, 2500)
		];
		const text = secondsText(late);
		expect(listRows(text).map(([timeS]) => timeS)).toEqual(
			late.map(([timeS]) => Number(timeS)).sort((a, b) => a - b)
		);
		expect(readBytes(toBytes(text), SECONDS, { pieceBytes: 97 })).toEqual(readText(text));
	});

	it('are kept where the days of a file stand the wrong way round', () => {
		const [first, second] = [steady(3000), steady(3000, 86_400)];
		const { trace, report } = readText(secondsText([...second, ...first]));
		expect(report.rows).toMatchObject({ kept: 6000, moved: 3000 });
		expect(trace).toEqual(readText(secondsText([...first, ...second])).trace);
		expect(report.gaps).toMatchObject({ count: 1, told: [{ fromS: 2999, toS: 86_400, line: null }] });
	});

	it('are dropped far back in a time that is covered, and counted', () => {
		const { rows } = reportOf([...steady(4000), ...steady(4000)]);
		expect(rows).toMatchObject({ read: 8000, kept: 4000, dropped: { alreadyCovered: 4000 } });
	});

	it('do not hide a second of silence between two parts', () => {
		const { rows } = reportOf([...steady(2000, 4000), ...steady(2000), ...steady(2000, 2000)]);
		expect(rows).toMatchObject({ kept: 6000 });
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

describe('gaps', () => {
	it('are longer than five median intervals, and told with their line', () => {
		const rows = [...steady(100), ...steady(100, 105), ...steady(100, 300)].filter(
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
		const text = secondsText([...steady(100), ...steady(100, 103)]);
		expect(readText(text, SECONDS, { gapIntervals: 3 }).report.gaps.count).toBe(1);
		expect(readText(text, SECONDS, { gapIntervals: 4 }).report.gaps.count).toBe(0);
	});

	it('are all counted and the hundred longest told', () => {
		const rows: Row[] = [];
		for (let at = 0, timeS = 0; at < 150; at++, timeS += 40 + at) rows.push(...steady(30, timeS));
		const { count, told } = reportOf(rows).gaps;
		expect([count, told.length]).toEqual([149, 100]);
		expect(told[0]!.toS - told[0]!.fromS).toBe(12 + 49);
	});
});

describe('cells that are no measurements', () => {
	it.each([
		['blank', ''],
		['blank', 'NaN'],
		['blank', '---'],
		['unreadable', 'warm'],
		['unreadable', '1,5'],
		['unreadable', '20.1.2'],
		['unreadable', '-'.repeat(5)],
		['sentinel', '-127'],
		['sentinel', '-127.00'],
		['sentinel', '9999'],
		['sentinel', '85'],
		['sentinel', '85.0'],
		['impossible', '151'],
		['impossible', '-61'],
		['impossible', '1e999'],
		['spike', '29'],
		['spike', '11.5']
	])('%s: %j', (reason, cell) => {
		const rows: Row[] = [...steady(3), [3, `"${cell}"`], ...steady(3, 4)];
		const report = reportOf(rows);
		expect(report.cells.cellC).toMatchObject({ values: 6, [reason]: 1 });
		const value = reason === 'spike' ? String(Number(cell)) : cell;
		expect(report.findings).toEqual([{ reason, line: 5, column: 2, value }]);
		expect(report.rows.kept).toBe(7);
		expect(listRows(secondsText(rows))[3]![1]).toBeNaN();
		expectWhole(report);
	});

	it('are told five times each and counted always', () => {
		const { findings, cells } = reportOf([...steady(2), ...steady(9, 2).map(([s]): Row => [s, 'x'])]);
		expect([findings.length, cells.cellC!.unreadable]).toEqual([5, 9]);
	});

	it('do not take what is true: 85 °C on the way up, the ends of the range, a step that stays, a current that jumps', () => {
		expect(
			reportOf([
				[0, 80],
				[1, 84.5],
				[2, 85],
				[3, 85],
				[4, 86]
			]).cells.cellC
		).toMatchObject({ values: 5, sentinel: 0 });
		expect(
			reportOf([
				[0, 150],
				[9999, -60]
			]).cells.cellC
		).toMatchObject({ values: 2 });
		expect(
			reportOf([
				[0, 20],
				[1, 40],
				[2, 40],
				[3, 20]
			]).cells.cellC
		).toMatchObject({ values: 4, spike: 0 });
		const current: TraceMapping = { ...SECONDS, columns: [{ column: 2, channel: 'currentA', unit: 'A' }] };
		expect(readText('0,-3\n1,85\n2,-3\n', current).report.cells.currentA).toMatchObject({ values: 3 });
	});

	it('do not take what could have risen in between: a spike has near neighbours', () => {
		expect(
			reportOf([
				[0, 20],
				[600, 40],
				[1200, 20]
			]).cells.cellC
		).toMatchObject({ values: 3, spike: 0 });
	});

	it('at power-on are passed over until the sensor has measured, in °F too', () => {
		expect(
			reportOf([
				[0, 85],
				[1, 85],
				[2, 21],
				[3, 21]
			]).cells.cellC
		).toMatchObject({ values: 2, sentinel: 2 });
		const inF: TraceMapping = { ...SECONDS, columns: [{ column: 2, channel: 'cellC', unit: '°F' }] };
		expect(readText('0,185\n1,-196.6\n2,70\n3,70\n', inF).report.cells.cellC).toMatchObject({
			values: 2,
			sentinel: 2
		});
	});
});

describe('lines that are no rows', () => {
	it('are counted: what stands above, blank ones, comments, a header once more, rows cut short, times of no kind', () => {
		const text = 'unit 4\ns,cell\n0,20\n\n# paused\n1,20\ns,cell\n2\nlater,20\n3,20\n';
		const { report } = readText(text);
		expect(report.lines).toEqual({ total: 10, before: 2, blank: 1, comments: 1 });
		expect(report.rows).toMatchObject({
			read: 6,
			kept: 3,
			dropped: { repeatedHeader: 1, shortRow: 1, noTime: 1 }
		});
		expect(report.findings.map(({ reason, line, column }) => [reason, line, column])).toEqual([
			['repeatedHeader', 7, null],
			['shortRow', 8, null],
			['noTime', 9, 1]
		]);
		expectWhole(report);
	});

	it('above the first row are as many as one says', () => {
		const text = 's,cell\nsoon,20\n1,20\n2,20\n';
		expect(readText(text).report.lines.before).toBe(2);
		const { report } = readText(text, SECONDS, { firstRowLine: 2 });
		expect([report.lines.before, report.rows.dropped.noTime]).toEqual([1, 1]);
	});
});

describe('nothing is dropped silently', () => {
	const cell = fc.oneof(
		fc.integer({ min: -70, max: 160 }).map(String),
		fc.constantFrom('', 'x', '85', '-127', '9999', '"20', '1e2', ',', '#')
	);
	const time = fc.oneof(fc.integer({ min: 0, max: 40 }), fc.integer({ min: 0, max: 30_000 })).map(String);
	const line = fc.oneof(
		{ weight: 8, arbitrary: fc.tuple(time, cell).map((cells) => cells.join(',')) },
		{ weight: 1, arbitrary: fc.constantFrom('', '# note', 's,cell', '7', 'x,y', ',,,') }
	);

	it('whatever stands in the lines', () => {
		fc.assert(
			fc.property(fc.array(line, { maxLength: 60 }), fc.integer({ min: 1, max: 40 }), (lines, pieceBytes) => {
				const bytes = toBytes(['s,cell', '0,20', '1,20', ...lines].join('\n'));
				const reading = readBytes(bytes, SECONDS);
				expectWhole(reading.report);
				expect(readBytes(bytes, SECONDS, { pieceBytes })).toEqual(reading);
				const { count } = reading.trace.channels.cellC!;
				expect(count.reduce((a, b) => a + b, 0)).toBeLessThanOrEqual(reading.report.cells.cellC!.values);
			}),
			{ numRuns: 100, seed: 11 }
		);
	});
});

describe('what cannot be read is refused with its place', () => {
	const read = (text: string, mapping = SECONDS) => refusalOf(() => readText(text, mapping));

	it.each([
		['a zero byte', 's,cell\n0,20\n1,2\u00000\n', { code: 'binary_content', line: 3, column: 2 }],
		['no row', 's,cell\n', { code: 'no_numeric_rows', line: 1 }],
		['nothing at all', '', { code: 'no_numeric_rows', line: null }],
		['words alone', 'Dear workshop,\nit was hot.\n', { code: 'no_numeric_rows', line: 2 }],
		['one row', 's,cell\n0,20\n', { code: 'too_few_rows', line: 2 }],
		['one value', '0,20\n1,\n2,x\n', { code: 'too_few_rows', line: 3 }],
		[
			'a time after 60 days',
			`0,20\n${LONGEST_TRACE_S},20\n${LONGEST_TRACE_S + 1},20\n`,
			{ code: 'too_long', line: 3, column: 1 }
		],
		['a row without an end', `0,20\n1,"${'x'.repeat(70_000)}`, { code: 'row_too_long', line: 2 }]
	])('%s', (_, text, fault) => {
		expect(read(text)).toMatchObject(fault);
		for (const pieceBytes of [7, 64]) {
			expect(refusalOf(() => readBytes(toBytes(text), SECONDS, { pieceBytes }))).toMatchObject(fault);
		}
	});

	it('rows whose time is of another kind', () => {
		const fault = refusalOf(() => readText('s,cell\nx,20\ny,20\n', SECONDS, { firstRowLine: 2 }));
		expect(fault).toMatchObject({ code: 'no_time_column', line: 3, column: 1 });
		expect(fault.message).toBe(
			'Line 3, column 1: found no time in any row; needed: times as the mapping says.'
		);
	});

	it('times that jump about without end', () => {
		const rows = Array.from({ length: 2000 }, (_, at): Row => [((at * 7919) % 1000) * 4000 + at, 20]);
		expect(reportOf(rows).rows.read).toBe(2000);
		const far = Array.from({ length: 5002 }, (_, at): Row => [(at % 2 === 0 ? 5e6 : 2.5e6) - at * 450, 20]);
		expect(read(secondsText(far)).code).toBe('not_in_order');
	});

	it('more bytes than 200 MB, before they are looked at', () => {
		const reader = new TraceReader(SECONDS);
		expect(refusalOf(() => reader.push(new Uint8Array(MOST_TRACE_BYTES + 1))).code).toBe('too_many_bytes');
	});

	it.each([
		['a unit of something else', { columns: [{ column: 2, channel: 'cellC', unit: 'A' }] }, 'wrong_mapping'],
		['a column twice', { columns: [{ column: 1, channel: 'cellC', unit: '°C' }] }, 'wrong_mapping'],
		['no columns', { columns: [] }, 'wrong_mapping'],
		['column 0', { columns: [{ column: 0, channel: 'cellC', unit: '°C' }] }, 'wrong_mapping'],
		[
			'a channel that there is not',
			{ columns: [{ column: 2, channel: 'oilC', unit: '°C' }] },
			'wrong_mapping'
		],
		['a delimiter that there is not', { delimiter: ' ' }, 'wrong_mapping'],
		['no time', { time: null }, 'no_time_column'],
		[
			'a zone that there is not',
			{ time: { kind: 'calendar', column: 1, clockColumn: null, order: 'ymd', timeZone: 'Mars/North' } },
			'no_such_zone'
		],
		[
			'a first day that is none',
			{ time: { kind: 'time-of-day', column: 1, firstDay: 'today', timeZone: 'UTC' } },
			'wrong_mapping'
		]
	])('a mapping with %s', (_, change, code) => {
		const mapping = { ...SECONDS, ...change } as TraceMapping;
		expect(refusalOf(() => new TraceReader(mapping)).code).toBe(code);
	});
});
