import { MOST_COLUMNS } from './mapping';
import { BYTE, isBlank } from './parse-number';
import { joinBytes } from './text-source';
import { TraceError } from './trace-error';

/** Where the cells of one row stand; without the blanks and the quotation marks around them. */
export interface CellSpans {
	bytes: Uint8Array;
	starts: Int32Array;
	ends: Int32Array;
	count: number;
	/** The line that the row begins on, counted from 1. */
	line: number;
	/** The row itself, from its first byte to its line end. */
	from: number;
	to: number;
}

/** No row of a logger is as long as this; a quotation mark that nobody closes would make one. */
export const MOST_ROW_BYTES = 65_536;

/**
 * Cuts a text into rows and cells after RFC 4180, whatever the pieces it comes in: a cell may stand in quotation marks, and then
 * hold delimiters and line ends. Lines may end in CR LF, LF or CR. One object is used for all rows, and holds until the next.
 */
export class RowSplitter {
	private held: Uint8Array = new Uint8Array(0);
	private line = 1;
	private afterReturn = false;
	private linesInside = 0;
	private readonly row: CellSpans = {
		...{ bytes: this.held, starts: new Int32Array(MOST_COLUMNS), ends: new Int32Array(MOST_COLUMNS) },
		...{ count: 0, line: 1, from: 0, to: 0 }
	};

	constructor(
		private readonly delimiter: number,
		private readonly onRow: (row: CellSpans) => void
	) {}

	push(bytes: Uint8Array): void {
		const zeroAt = bytes.indexOf(0);
		this.split(zeroAt < 0 ? bytes : bytes.subarray(0, zeroAt), false);
		if (zeroAt >= 0) this.refuseZero();
	}

	/** The last row, where no line end stands behind it. */
	finish(): void {
		if (this.held.length > 0) this.split(new Uint8Array(0), true);
	}

	private refuseZero(): never {
		const { held, line } = this;
		const column = held.reduce((count, byte) => count + (byte === this.delimiter ? 1 : 0), 1);
		throw new TraceError({ code: 'binary_content', line, column, value: 'a zero byte', limit: 'text alone' });
	}

	private split(bytes: Uint8Array, isEnd: boolean): void {
		const all = this.held.length === 0 ? bytes : joinBytes(this.held, bytes);
		this.row.bytes = all;
		let from = 0;
		while (from < all.length) {
			if (this.afterReturn) {
				this.afterReturn = false;
				if (all[from] === BYTE.lineFeed) {
					from++;
					continue;
				}
			}
			const end = this.readRow(all, from, isEnd);
			if (end < 0) break;
			from = end;
		}
		this.hold(all.subarray(from));
	}

	private hold(rest: Uint8Array): void {
		if (rest.length > MOST_ROW_BYTES) this.refuseLong();
		// A copy: the piece belongs to the caller, who may write into it again.
		this.held = rest.slice();
	}

	private refuseLong(): never {
		const limit = `a line end within ${MOST_ROW_BYTES} bytes; a quotation mark may be open`;
		throw new TraceError({
			code: 'row_too_long',
			line: this.line,
			column: null,
			value: 'a longer row',
			limit
		});
	}

	/** Reads one row and gives it on; the place behind its line end, or −1 where it is not all there yet. */
	private readRow(bytes: Uint8Array, from: number, isEnd: boolean): number {
		const { row, delimiter } = this;
		let count = 0;
		let at = from;
		this.linesInside = 0;
		for (;;) {
			const end = this.readCell(bytes, at, count, isEnd);
			if (end < 0) return -1;
			count++;
			at = end;
			if (at >= bytes.length || bytes[at] !== delimiter) break;
			at++;
		}
		if (at - from > MOST_ROW_BYTES) this.refuseLong();
		this.afterReturn = bytes[at] === BYTE.carriageReturn;
		row.count = Math.min(count, MOST_COLUMNS);
		row.line = this.line;
		row.from = from;
		row.to = at;
		this.line += this.linesInside + 1;
		this.onRow(row);
		return at + 1;
	}

	/** The place of the delimiter or line end behind a cell, or −1. */
	private readCell(bytes: Uint8Array, from: number, cell: number, isEnd: boolean): number {
		const { delimiter } = this;
		const { length } = bytes;
		let at = from;
		while (at < length && bytes[at] === BYTE.space) at++;
		let start = from;
		let end = -1;
		if (at < length && bytes[at] === BYTE.quote) {
			start = at + 1;
			end = this.findClosingQuote(bytes, start);
			at = end + 1;
		}
		for (; at < length; at++) {
			const byte = bytes[at]!;
			if (byte === delimiter || byte === BYTE.lineFeed || byte === BYTE.carriageReturn) break;
		}
		if (at >= length) {
			if (!isEnd) return -1;
			at = length;
		}
		if (cell < MOST_COLUMNS) this.setCell(cell, bytes, start, end < 0 ? at : Math.min(end, length));
		return at;
	}

	/** The end of the text where nobody closes it. */
	private findClosingQuote(bytes: Uint8Array, from: number): number {
		for (let at = from; at < bytes.length; at++) {
			const byte = bytes[at];
			if (byte === BYTE.lineFeed) this.linesInside++;
			if (byte !== BYTE.quote) continue;
			if (bytes[at + 1] !== BYTE.quote) return at;
			at++;
		}
		return bytes.length;
	}

	private setCell(cell: number, bytes: Uint8Array, from: number, to: number): void {
		let start = from;
		let end = to;
		while (start < end && isBlank(bytes[start]!)) start++;
		while (end > start && isBlank(bytes[end - 1]!)) end--;
		this.row.starts[cell] = start;
		this.row.ends[cell] = end;
	}
}
