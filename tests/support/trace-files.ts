import { TraceReader } from '../../src/lib/thermal/traces/read-trace';
import type { TraceMapping } from '../../src/lib/thermal/traces/mapping';
import type { ReadOptions, TraceReading } from '../../src/lib/thermal/traces/reading-types';
import type { BinnedTrace, ChannelBins } from '../../src/lib/thermal/traces/binned-trace';
import type { TraceChannel } from '../../src/lib/thermal/traces/channels';
import type { TraceReport } from '../../src/lib/thermal/traces/trace-report';
import { TraceError } from '../../src/lib/thermal/traces/trace-error';

export const toBytes = (text: string): Uint8Array => new TextEncoder().encode(text);

/** Seconds in column 1, cells in column 2: the least that there is to read. */
export const SECONDS: TraceMapping = {
	...{ version: 1, delimiter: ',', decimal: '.', time: { kind: 'elapsed-s', column: 1 } },
	columns: [{ column: 2, channel: 'cellC', unit: '°C' }]
};

/** One reading of bytes, in pieces of a size. */
export function readBytes(
	bytes: Uint8Array,
	mapping: TraceMapping,
	options: ReadOptions & { pieceBytes?: number } = {}
): TraceReading {
	const { pieceBytes = bytes.length, ...rest } = options;
	const reader = new TraceReader(mapping, rest);
	for (let from = 0; from < bytes.length; from += pieceBytes) {
		// A copy that is spoilt afterwards: the reader must not hold on to what is not its own.
		const piece = bytes.slice(from, from + pieceBytes);
		reader.push(piece);
		piece.fill(0x39);
	}
	return reader.finish();
}

export const readText = (text: string, mapping = SECONDS, options: ReadOptions = {}): TraceReading =>
	readBytes(toBytes(text), mapping, options);

/** The rows of a text as [time, value] of its first channel. */
export function listRows(text: string, mapping = SECONDS): [number, number][] {
	const rows: [number, number][] = [];
	readText(text, mapping, {
		onRows: ({ count, timeS, values }) => {
			const column = values[mapping.columns[0]!.channel]!;
			for (let row = 0; row < count; row++) rows.push([timeS[row]!, column[row]!]);
		}
	});
	return rows;
}

/** Lines of seconds and values. */
export const secondsText = (rows: readonly (readonly [number | string, number | string])[]): string =>
	`${['s,cell', ...rows.map((row) => row.join(','))].join('\n')}\n`;

export function refusalOf(read: () => unknown): TraceError {
	try {
		read();
	} catch (error) {
		if (error instanceof TraceError) return error;
		throw error;
	}
	throw new Error('It was taken.');
}

/** Bins of one value each. */
export function binsOf(values: readonly number[]): ChannelBins {
	const column = Float32Array.from(values);
	return {
		count: Uint32Array.from(values, (value) => (Number.isNaN(value) ? 0 : 1)),
		mean: column,
		min: column.slice(),
		max: column.slice()
	};
}

/** A trace of minutes. */
export function minutesTrace(
	channels: Partial<Record<TraceChannel, readonly number[]>>,
	more: Partial<BinnedTrace> = {}
): BinnedTrace {
	const entries = Object.entries(channels).map(([channel, values]) => [channel, binsOf(values)] as const);
	const binCount = Object.values(channels)[0]!.length;
	const base = { timeBase: 'time-of-day', timeZone: null, startS: 0, stepS: 60, binCount } as const;
	return { ...base, channels: Object.fromEntries(entries), ...more };
}

/** Noise that is the same every time, about −1 to 1. */
export const noiseAt = (at: number): number => ((Math.imul(at + 1, 0x9e3779b1) >>> 8) % 2001) / 1000 - 1;

/** A time and a value as they are written. */
export type Row = readonly [number | string, number | string];

/** So many seconds of a reading that hardly moves. */
export const steadyRows = (count: number, from = 0): Row[] =>
	Array.from({ length: count }, (_, at) => [from + at, 20 + (at % 5) / 10]);

export const reportOf = (rows: readonly Row[]): TraceReport => readText(secondsText(rows)).report;
