import { BinBuilder } from './bin-builder';
import type { TraceChannel } from './channels';
import { findJumps, JUMPS_TOLD, type TraceJump } from './find-jumps';
import { FindingList } from './findings';
import { IntervalTally } from './interval-tally';
import { checkMapping, type TraceMapping } from './mapping';
import {
	GAP_INTERVALS,
	LONGEST_TRACE_S,
	MOST_TRACE_BYTES,
	MOST_TRACE_ROWS,
	toColumns,
	type ReadOptions,
	type TraceReading
} from './reading-types';
import { RowGate } from './row-gate';
import { LINE_AT, RowSorter, TIME_AT, VALUES_FROM } from './row-sorter';
import { RowSplitter, type CellSpans } from './row-splitter';
import { SpikeFilter } from './spike-filter';
import { TextSource } from './text-source';
import { makeTimeReader, type TimeReader } from './time-reader';
import { faultOfWhole, TraceError } from './trace-error';
import type { TraceReport } from './trace-report';
import { ValueReader } from './value-reader';

/**
 * Reads a logger's CSV in a stream: pieces of the file in, kept rows and the binned trace out, in memory that does not grow.
 *
 * Feed it with `push` as the pieces come, breathe between them, and ask `finish` for what came of it. Pieces may be cut
 * anywhere: the answer is the same. Rows come to `onRows` in order of time, at most 2,047 a call; rows that a file brings far out
 * of order begin again with an earlier time.
 *
 * @throws TraceError from the constructor for a mapping that cannot be; from `push` and `finish` for a file that cannot be read,
 *   with line and column
 * Validity: text in UTF-8, UTF-16 or a code that holds ISO 646; at most 200 MB, 5 million rows, 60 days, 256 columns.
 * Source: RFC 4180 (2005) for rows and cells, ISO 8601-1:2019 for times.
 * @example
 * const time = { kind: 'elapsed-s', column: 1 };
 * const columns = [{ column: 2, channel: 'cellC', unit: '°C' }];
 * const reader = new TraceReader({ version: 1, delimiter: ',', decimal: '.', time, columns });
 * reader.push(new TextEncoder().encode('s,cell\n0,20\n1,20.5\n2,21\n'));
 * reader.finish().report.rows.kept; // 3
 */
export class TraceReader {
	private readonly text = new TextSource();
	private readonly splitter: RowSplitter;
	private readonly gate: RowGate;
	private readonly sorter: RowSorter;
	private readonly spikes: SpikeFilter;
	private readonly bins: BinBuilder;
	private readonly intervals = new IntervalTally();
	private readonly findings: FindingList;
	private readonly time: TimeReader;
	private readonly values: ValueReader[];
	private readonly channels: TraceChannel[];
	private readonly row: Float64Array;
	private bytes = 0;
	private kept = 0;
	private usable = 0;
	private timed = 0;
	private firstS = Infinity;
	private lastS = -Infinity;

	constructor(
		private readonly mapping: TraceMapping,
		private readonly options: ReadOptions = {}
	) {
		checkMapping(mapping);
		const { columns } = mapping;
		const decimal = mapping.decimal.charCodeAt(0);
		this.channels = columns.map(({ channel }) => channel);
		this.findings = new FindingList(this.channels);
		this.values = columns.map((column, at) => new ValueReader(column, at, decimal, this.findings));
		this.time = makeTimeReader(mapping.time, decimal);
		this.row = new Float64Array(VALUES_FROM + columns.length);
		this.spikes = new SpikeFilter(columns, this.findings);
		this.bins = new BinBuilder(this.channels);
		this.sorter = new RowSorter(this.row.length, this.findings, {
			take: this.takeRows,
			join: ({ fromS, toS, line }) => this.intervals.add(fromS, toS, line)
		});
		this.gate = new RowGate(mapping, this.time, this.findings, options.firstRowLine ?? null);
		this.splitter = new RowSplitter(mapping.delimiter.charCodeAt(0), this.readRow);
	}

	/** Takes the next piece of the file. */
	push(bytes: Uint8Array): void {
		this.bytes += bytes.length;
		if (this.bytes > MOST_TRACE_BYTES) {
			throw faultOfWhole('too_many_bytes', 'more bytes', `at most ${MOST_TRACE_BYTES} bytes`);
		}
		this.splitter.push(this.text.push(bytes));
	}

	/** What came of the whole file. */
	finish(): TraceReading {
		this.splitter.push(this.text.finish());
		this.splitter.finish();
		this.sorter.flush();
		this.requireEnough();
		const { list } = this.sorter.spans;
		list
			.slice(1)
			.forEach(({ startS, startLine }, at) => this.intervals.add(list[at]!.endS, startS, startLine));
		const medianIntervalS = this.intervals.medianS();
		const { base, clock } = this.time;
		const timeZone = clock?.timeZone ?? null;
		const trace = { timeBase: base, timeZone, ...this.bins.finish(medianIntervalS) };
		return { trace, report: this.makeReport(medianIntervalS, findJumps(trace)) };
	}

	private readonly readRow = (row: CellSpans): void => {
		const timeS = this.gate.admit(row);
		if (timeS !== timeS) return;
		if (this.gate.rows > MOST_TRACE_ROWS)
			this.refuse('too_many_rows', row, 'one more row', `${MOST_TRACE_ROWS} rows`);
		if (timeS < this.firstS) this.firstS = timeS;
		if (timeS > this.lastS) this.lastS = timeS;
		if (this.lastS - this.firstS > LONGEST_TRACE_S)
			this.refuse('too_long', row, 'a time later or earlier', '60 days');
		this.row[TIME_AT] = timeS;
		this.row[LINE_AT] = row.line;
		for (let at = 0; at < this.values.length; at++) this.row[VALUES_FROM + at] = this.values[at]!.read(row);
		this.timed++;
		this.sorter.add(this.row);
	};

	private refuse(
		code: 'too_many_rows' | 'too_long',
		{ line }: CellSpans,
		value: string,
		most: string
	): never {
		const column = code === 'too_long' ? this.mapping.time.column : null;
		throw new TraceError({ code, line, column, value, limit: `at most ${most}` });
	}

	private readonly takeRows = (rows: Float64Array, count: number, beforeS: number, known: number): void => {
		const width = this.row.length;
		this.spikes.filter(rows, count, known);
		this.bins.add(rows, count);
		let lastS = beforeS;
		for (let from = 0; from < count * width; from += width) {
			const timeS = rows[from + TIME_AT]!;
			if (lastS === lastS) this.intervals.add(lastS, timeS, rows[from + LINE_AT]!);
			lastS = timeS;
			if (hasValue(rows, from + VALUES_FROM, from + width)) this.usable++;
		}
		this.kept += count;
		this.options.onRows?.(toColumns(rows, count, this.channels));
	};

	private requireEnough(): void {
		if (this.usable >= 2) return;
		const { rows, lastLine } = this.gate;
		const place = { line: lastLine === 0 ? null : lastLine, column: null };
		if (rows > 0 && rows === this.findings.dropped.noTime) {
			const column = this.time.wrongColumn;
			const limit = 'times as the mapping says';
			throw new TraceError({ code: 'no_time_column', ...place, column, value: 'no time in any row', limit });
		}
		const limit = 'at least 2 rows with a time and a number';
		const code = this.usable === 0 ? 'no_numeric_rows' : 'too_few_rows';
		throw new TraceError({ code, ...place, value: `${this.usable} such rows to the end`, limit });
	}

	private makeReport(medianIntervalS: number, jumps: TraceJump[]): TraceReport {
		const { gate, findings, sorter, time, timed, kept } = this;
		const overS = (this.options.gapIntervals ?? GAP_INTERVALS) * medianIntervalS;
		const { dropped } = findings;
		return {
			bytes: this.bytes,
			lines: { total: gate.lines, before: gate.before, blank: gate.blank, comments: gate.comments },
			rows: { read: gate.rows, timed, kept, dropped: { ...dropped }, moved: sorter.moved },
			cells: Object.fromEntries(this.channels.map((channel, at) => [channel, { ...findings.cells[at]! }])),
			medianIntervalS,
			gaps: { overS, ...this.intervals.gapsOver(overS) },
			jumps: { count: jumps.length, told: jumps.slice(0, JUMPS_TOLD) },
			clockChanges: { twiceRows: time.clock?.foldRows ?? 0, neverRows: time.clock?.gapRows ?? 0 },
			findings: [...findings.told]
		};
	}
}

function hasValue(rows: Float64Array, from: number, to: number): boolean {
	for (let at = from; at < to; at++) if (rows[at] === rows[at]) return true;
	return false;
}
