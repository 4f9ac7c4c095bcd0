import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
	listRows,
	readBytes,
	readText,
	refusalOf,
	reportOf,
	type Row,
	SECONDS,
	secondsText,
	steadyRows,
	toBytes
} from '../../../../tests/support/trace-files';
import type { TraceMapping } from './mapping';
import { LONGEST_TRACE_S, MOST_TRACE_BYTES } from './reading-types';
import { TraceReader } from './read-trace';
import type { TraceReport } from './trace-report';

const sum = (counts: Record<string, number>): number => Object.values(counts).reduce((a, b) => a + b, 0);

/** Everything that went in is somewhere. */
function expectWhole({ lines, rows, cells }: TraceReport): void {
	expect(lines.before + lines.blank + lines.comments + rows.read).toBe(lines.total);
	expect(rows.kept + sum(rows.dropped)).toBe(rows.read);
	for (const counts of Object.values(cells)) expect(sum(counts)).toBe(rows.timed);
}

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
		const rows: Row[] = [...steadyRows(3), [3, `"${cell}"`], ...steadyRows(3, 4)];
		const report = reportOf(rows);
		expect(report.cells.cellC).toMatchObject({ values: 6, [reason]: 1 });
		const value = reason === 'spike' ? String(Number(cell)) : cell;
		expect(report.findings).toEqual([{ reason, line: 5, column: 2, value }]);
		expect(report.rows.kept).toBe(7);
		expect(listRows(secondsText(rows))[3]![1]).toBeNaN();
		expectWhole(report);
	});

	it('are told five times each and counted always', () => {
		const { findings, cells } = reportOf([...steadyRows(2), ...steadyRows(9, 2).map(([s]): Row => [s, 'x'])]);
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

	it('may last for minutes: those are kept, and marked', () => {
		const rows = Array.from({ length: 60 }, (_, at): Row => [60 * at, at >= 20 && at < 24 ? 95 : 30]);
		const report = reportOf(rows);
		expect(report.cells.cellC).toMatchObject({ values: 60, spike: 0 });
		expect(report.jumps).toEqual({
			count: 1,
			told: [{ channel: 'cellC', fromS: 1200, toS: 1440, offK: 65, stays: false }]
		});
		expect(reportOf(steadyRows(60)).jumps).toEqual({ count: 0, told: [] });
	});

	it('are found wherever they stand in a long file', () => {
		const spikesAt = [1, 1022, 1023, 1024, 1025, 1027, 2047, 2048, 2050, 2998];
		const rows = steadyRows(3000).map(([timeS, value], at): Row => [
			timeS,
			spikesAt.includes(at) && at % 2 === 0 ? 60 : value
		]);
		expect(reportOf(rows).cells.cellC!.spike).toBe(spikesAt.filter((at) => at % 2 === 0).length);
		for (const at of spikesAt) {
			const one = steadyRows(3000).map(([timeS, value], row): Row => [timeS, row === at ? 60 : value]);
			expect(reportOf(one).findings).toEqual([{ reason: 'spike', line: at + 2, column: 2, value: '60' }]);
		}
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

	it('are told with the column that says no time: that of the date, or that of the time of day', () => {
		const time = { kind: 'calendar', column: 1, clockColumn: 2, order: 'ymd', timeZone: 'UTC' } as const;
		const columns = [{ column: 3, channel: 'cellC', unit: '°C' } as const];
		const row = (day: string, clock: string) => `${day},${clock},20\n`;
		const text = [
			...['day,clock,cell\n', row('2026-02-03', '08:00'), row('2026-02-03', '25:99'), row('soon', '08:02')],
			...[row('2026-02-03', '08:03'), row('2026-02-03', 'noon')]
		].join('');
		const { findings } = readText(text, { ...SECONDS, time, columns }).report;
		expect(findings.map(({ reason, line, column, value }) => [reason, line, column, value])).toEqual([
			['noTime', 3, 2, '25:99'],
			['noTime', 4, 1, 'soon'],
			['noTime', 6, 2, 'noon']
		]);
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
		for (const pieceBytes of text.length < 1000 ? [1, 7] : [1000]) {
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
			'a zone that there is not, of seconds since 1970',
			{ time: { kind: 'epoch-s', column: 1, timeZone: 'Mars/North' } },
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
