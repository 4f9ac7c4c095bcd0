import { open } from 'node:fs/promises';
import type { TraceProposalView } from '$lib/schemas/traces';
import {
	describeTrace,
	SAMPLE_BYTES,
	TRACE_ERROR_CODES,
	TraceError,
	type TraceMapping,
	type TraceProposal
} from '$lib/thermal/traces';
import { readSampleRows } from '$lib/thermal/traces/sample-rows';
import { decodeSample } from '$lib/thermal/traces/text-source';
import { AppError } from '../errors';

const FIRST_ROWS = 6;
const LONGEST_CELL = 60;

/** The beginning of a file: enough to say what it is. */
export async function readSample(path: string): Promise<Uint8Array> {
	const handle = await open(path, 'r');
	try {
		const { buffer, bytesRead } = await handle.read(Buffer.alloc(SAMPLE_BYTES), 0, SAMPLE_BYTES, 0);
		return buffer.subarray(0, bytesRead);
	} finally {
		await handle.close();
	}
}

/** What is wrong with a file, for people: what, and where. */
export const sayTraceError = ({ code, message }: TraceError): string =>
	`${TRACE_ERROR_CODES[code]} ${message}`;

/** What is wrong with a file as a refusal that points at the box it came from. */
export function refuseTrace(error: unknown, path: string): never {
	if (!(error instanceof TraceError)) throw error;
	const message = sayTraceError(error);
	const { code, line, column, limit } = error;
	const place = {
		...(line === null ? {} : { line }),
		...(column === null ? {} : { column: { number: column, name: '' } })
	};
	throw new AppError('invalid_input', message, [{ path, message, code, limit, ...place }]);
}

/** What a file seems to be; refused in words where it is no trace. */
export function describeSample(sample: Uint8Array, timeZone: string): TraceProposal {
	try {
		return describeTrace(sample, timeZone);
	} catch (error) {
		refuseTrace(error, 'file');
	}
}

/** The proposal as it is kept and shown, with the first rows as they stand in the file. */
export function keepProposal(
	{ headerLine, firstRowLine, columns, time, notes, delimiter }: TraceProposal,
	sample: Uint8Array,
	knownSince: Date | null
): TraceProposalView {
	const rows = readSampleRows(decodeSample(sample), delimiter).filter(({ line }) => line >= firstRowLine);
	return {
		...{ headerLine, firstRowLine, notes },
		columns: columns.map(({ number, name }) => ({ number, name: name.slice(0, LONGEST_CELL) })),
		firstRows: rows
			.slice(0, FIRST_ROWS)
			.map(({ cells }) => columns.map(({ number }) => (cells[number - 1] ?? '').slice(0, LONGEST_CELL))),
		timeWhy: time.why,
		knownSince: knownSince?.toISOString() ?? null
	};
}

/** A mapping that is remembered, for another file: the day of the first row is another one. */
export function forAnotherFile(mapping: TraceMapping): TraceMapping {
	const { time } = mapping;
	return time.kind === 'time-of-day' ? { ...mapping, time: { ...time, firstDay: null } } : mapping;
}
