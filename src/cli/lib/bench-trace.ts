import { createReadStream, createWriteStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { TraceMapping } from '../../lib/thermal/traces';
import { readTracePieces } from '../../lib/server/services/read-pieces';

/** A hundredth of the largest trace, and the largest: memory that grew with the file would show between them. */
export const TRACE_ROWS = [50_000, 5_000_000] as const;
const ROWS_A_PIECE = 5_000;

const MAPPING: TraceMapping = {
	...{ version: 1, delimiter: ',', decimal: '.', time: { kind: 'elapsed-s', column: 1 } },
	columns: [
		{ column: 2, channel: 'ambientC', unit: '°C' },
		{ column: 3, channel: 'cellC', unit: '°C' },
		{ column: 4, channel: 'currentA', unit: 'A' }
	]
};

/** A row a second, nothing in it like the one before. */
function writeRow(at: number): string {
	const wave = Math.sin(at / 4000);
	return `${at},${(24 + 8 * wave).toFixed(1)},${(38 + 12 * wave + (at % 7) / 10).toFixed(1)},${(at % 61) - 30}\n`;
}

function* listPieces(count: number): Generator<string> {
	yield 's,ambient,cell,current\n';
	for (let from = 0; from < count; from += ROWS_A_PIECE) {
		let piece = '';
		for (let at = from; at < Math.min(from + ROWS_A_PIECE, count); at++) piece += writeRow(at);
		yield piece;
	}
}

/** Writes a trace of so many rows, and says how many bytes it has. */
export async function writeTraceFile(path: string, count: number): Promise<number> {
	await pipeline(Readable.from(listPieces(count)), createWriteStream(path));
	return (await stat(path)).size;
}

export interface TraceRead {
	ms: number;
	kept: number;
	/** The most that the process has had in memory, all of it. */
	peakBytes: number;
}

/** Reads a trace as the application reads it. */
export async function readTraceFile(path: string): Promise<TraceRead> {
	const start = performance.now();
	const { report } = await readTracePieces(createReadStream(path), MAPPING);
	const ms = performance.now() - start;
	return { ms, kept: report.rows.kept, peakBytes: process.resourceUsage().maxRSS * 1024 };
}
