import type { FindingList } from './findings';
import { timeColumnsOf, type TraceMapping } from './mapping';
import { parseNumber, textOf } from './parse-number';
import type { CellSpans } from './row-splitter';
import type { TimeReader } from './time-reader';

const COMMENT = '#'.charCodeAt(0);

/** Tells rows from what stands over and between them, counts every line, and lets rows with a time through. */
export class RowGate {
	lines = 0;
	before = 0;
	blank = 0;
	comments = 0;
	rows = 0;
	lastLine = 0;
	private hasBegun = false;
	private header: Uint8Array = new Uint8Array(0);
	private readonly decimal: number;
	private readonly columns: readonly number[];
	/** So many cells a row must have. */
	private readonly needed: number;

	constructor(
		mapping: TraceMapping,
		private readonly time: TimeReader,
		private readonly findings: FindingList,
		private readonly firstRowLine: number | null
	) {
		this.decimal = mapping.decimal.charCodeAt(0);
		this.columns = mapping.columns.map(({ column }) => column);
		this.needed = Math.max(...timeColumnsOf(mapping.time), ...this.columns);
	}

	/** The time of a row, s; NaN where the line is no row or its time cannot be read, which is then counted. */
	admit(row: CellSpans): number {
		this.lines++;
		this.lastLine = row.line;
		if (row.count === 1 && row.starts[0] === row.ends[0]) {
			this.blank++;
			return NaN;
		}
		const told = row.count >= this.needed ? this.time.read(row) : NaN;
		const timeS = Math.abs(told) < Infinity ? told : NaN;
		if (!this.hasBegun && !this.begins(row, timeS)) {
			this.before++;
			this.header = row.bytes.slice(row.from, row.to);
			return NaN;
		}
		if (timeS !== timeS) this.passOver(row);
		else this.rows++;
		return timeS;
	}

	private begins(row: CellSpans, timeS: number): boolean {
		const { firstRowLine } = this;
		this.hasBegun = firstRowLine === null ? timeS === timeS && this.hasNumber(row) : row.line >= firstRowLine;
		return this.hasBegun;
	}

	private hasNumber({ bytes, starts, ends }: CellSpans): boolean {
		return this.columns.some((column) => {
			const value = parseNumber(bytes, starts[column - 1]!, ends[column - 1]!, this.decimal);
			return Number.isFinite(value);
		});
	}

	private passOver(row: CellSpans): void {
		if (row.bytes[row.from] === COMMENT) {
			this.comments++;
			return;
		}
		this.rows++;
		if (this.isHeader(row)) this.findings.dropRow('repeatedHeader', row.line, null, () => textOfRow(row));
		else if (row.count < this.needed) this.findings.dropRow('shortRow', row.line, null, () => textOfRow(row));
		else {
			const column = this.time.wrongColumn;
			const cell = () => textOf(row.bytes, row.starts[column - 1]!, row.ends[column - 1]!);
			this.findings.dropRow('noTime', row.line, column, cell);
		}
	}

	private isHeader({ bytes, from, to }: CellSpans): boolean {
		const { header } = this;
		return (
			to - from === header.length &&
			header.length > 0 &&
			header.every((byte, at) => bytes[from + at] === byte)
		);
	}
}

const textOfRow = ({ bytes, from, to }: CellSpans): string => textOf(bytes, from, to);
