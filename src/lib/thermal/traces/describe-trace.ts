import type { TraceChannel, TraceUnit } from './channels';
import { findChannel } from './find-channels';
import { findLayout, type TraceLayout } from './find-layout';
import { findTime, type SampleColumn, type TimeProposal } from './find-time';
import { loggerFingerprint } from './fingerprint';
import {
	timeColumnsOf,
	type ColumnMapping,
	type Decimal,
	type Delimiter,
	type TraceMapping
} from './mapping';
import { decodeSample, findTextCode, type TextCode } from './text-source';
import { TraceError } from './trace-error';
import { isTimeZone } from './zone-clock';

/** So many bytes are enough to describe a trace. */
export const SAMPLE_BYTES = 65_536;
const SAMPLE_CELLS = 5;
/** Control characters that do not part cells or lines. */
const CONTROLS = /[^\P{Cc}\t\r\n]/gu;
const MOST_CONTROLS = 0.02;

export interface ColumnProposal {
	/** Counted from 1. */
	number: number;
	name: string;
	/** Null where the name tells of none, or the time stands here. */
	channel: TraceChannel | null;
	unit: TraceUnit | null;
	/** Whether the header says the unit, or it was taken for granted. */
	unitSaid: boolean;
	samples: string[];
}

/** What a file seems to be, for somebody to confirm or put right. */
export interface TraceProposal {
	textCode: TextCode;
	delimiter: Delimiter;
	decimal: Decimal;
	/** The first line that names the columns, counted from 1; null where none does. */
	headerLine: number | null;
	firstRowLine: number;
	columns: ColumnProposal[];
	time: TimeProposal;
	/** What TraceReader takes; without columns where no name was recognised. */
	mapping: TraceMapping;
	fingerprint: string;
	/** What is to be looked at, in sentences. */
	notes: string[];
}

function refuseBinary(text: string): void {
	const controls = text.match(CONTROLS)?.length ?? 0;
	if (controls <= MOST_CONTROLS * text.length) return;
	const at = text.search(CONTROLS);
	const line = text.slice(0, at).split('\n').length;
	const found = { line, column: 1, value: `${controls} bytes that no text has` };
	throw new TraceError({ code: 'binary_content', ...found, limit: 'text alone' });
}

function nameColumns({ headerRows, rows, columnCount }: TraceLayout): SampleColumn[] {
	return Array.from({ length: columnCount }, (_, at) => {
		const names = headerRows.map(({ cells }) => cells[at] ?? '').filter((name) => name !== '');
		return {
			number: at + 1,
			name: names.length > 0 ? names.join(' ') : `column ${at + 1}`,
			cells: rows.map(({ cells }) => cells[at]!)
		};
	});
}

function proposeColumns(columns: readonly SampleColumn[], timeColumns: readonly number[]): ColumnProposal[] {
	const taken = new Set<TraceChannel>();
	return columns.map(({ number, name, cells }) => {
		const samples = cells.filter((cell) => cell !== '').slice(0, SAMPLE_CELLS);
		if (timeColumns.includes(number)) {
			return { number, name, channel: null, unit: null, unitSaid: false, samples };
		}
		const { channel, unit, unitSaid } = findChannel(name);
		const isFree = channel !== null && !taken.has(channel);
		if (isFree) taken.add(channel);
		return { number, name, channel: isFree ? channel : null, unit, unitSaid, samples };
	});
}

const toMapping = ({ number, channel, unit }: ColumnProposal): ColumnMapping[] =>
	channel === null || unit === null ? [] : [{ column: number, channel, unit }];

function makeNotes(time: TimeProposal, columns: readonly ColumnProposal[]): string[] {
	const notes: string[] = [];
	if (time.ambiguous) notes.push(time.why);
	const granted = columns.filter(({ channel, unitSaid }) => channel !== null && !unitSaid);
	for (const { name, unit } of granted) notes.push(`The unit of “${name}” is not said; ${unit} is taken.`);
	if (columns.every(({ channel }) => channel === null)) notes.push('No name of a column was recognised.');
	return notes;
}

/**
 * What a logger's file seems to be, from its first bytes: delimiter, decimal sign, header, where the time is, which column is which.
 *
 * @param firstBytes the beginning of the file, 64 KiB are enough; more is not looked at
 * @param timeZone IANA name of the zone to take where the file says none
 * @returns a proposal with a mapping that TraceReader takes as it is, and what a person should look at
 * @throws TraceError binary_content, no_numeric_rows, no_time_column or no_such_zone, with line and column
 * Validity: text in UTF-8, UTF-16 or Windows-1252; names of columns and months in English.
 * Source: RFC 4180 (2005) for rows and cells, ISO 8601-1:2019 for times; what else loggers write is common practice.
 * @example
 * const text = 'Date;Ambient (°C);Cell (°C)\n31.01.2026 14:00;38,5;41\n31.01.2026 14:01;38,6;41,2\n';
 * const { delimiter, decimal, time, mapping } = describeTrace(new TextEncoder().encode(text), 'Australia/Darwin');
 * [delimiter, decimal, time.mapping.order]; // [';', ',', 'dmy']
 * mapping.columns[1]; // { column: 3, channel: 'cellC', unit: '°C' }
 */
export function describeTrace(firstBytes: Uint8Array, timeZone = 'UTC'): TraceProposal {
	const bytes = firstBytes.subarray(0, SAMPLE_BYTES);
	if (!isTimeZone(timeZone)) {
		const limit = 'the IANA name of a time zone, such as Australia/Darwin';
		throw new TraceError({ code: 'no_such_zone', line: null, column: null, value: timeZone, limit });
	}
	const text = decodeSample(bytes);
	refuseBinary(text);
	const layout = findLayout(text);
	const { delimiter, decimal, headerRows, rows } = layout;
	const named = nameColumns(layout);
	const time = findTime(named, timeZone, decimal);
	const firstRowLine = rows[0]!.line;
	if (time === null) {
		const found = { line: headerRows[0]?.line ?? firstRowLine, column: 1, value: named[0]!.name };
		throw new TraceError({
			code: 'no_time_column',
			...found,
			limit: 'a column with dates, times or seconds'
		});
	}
	const columns = proposeColumns(named, timeColumnsOf(time.mapping));
	return {
		...{ textCode: findTextCode(bytes).code, delimiter, decimal, firstRowLine, columns, time },
		headerLine: headerRows[0]?.line ?? null,
		mapping: { version: 1, delimiter, decimal, time: time.mapping, columns: columns.flatMap(toMapping) },
		fingerprint: loggerFingerprint(named.map(({ name }) => name)),
		notes: makeNotes(time, columns)
	};
}
