import type { Delimiter } from './mapping';
import { RowSplitter } from './row-splitter';

export interface SampleRow {
	/** Counted from 1. */
	line: number;
	cells: string[];
}

/** So many rows tell what a file is. */
const ROWS_LOOKED_AT = 400;
const FEW = 3;

/** The rows of the beginning of a text; the last one only where it is whole, or there are hardly others. */
export function readSampleRows(text: string, delimiter: Delimiter): SampleRow[] {
	const rows: SampleRow[] = [];
	const decoder = new TextDecoder();
	const splitter = new RowSplitter(delimiter.charCodeAt(0), ({ bytes, starts, ends, count, line }) => {
		if (rows.length >= ROWS_LOOKED_AT) return;
		const cells = Array.from({ length: count }, (_, cell) =>
			decoder.decode(bytes.subarray(starts[cell]!, ends[cell]!)).replaceAll('""', '"')
		);
		rows.push({ line, cells });
	});
	splitter.push(new TextEncoder().encode(text));
	const whole = rows.length;
	if (whole < ROWS_LOOKED_AT) splitter.finish();
	return whole > FEW ? rows.slice(0, whole) : rows;
}
