import { CHANNEL_LAWS, TRACE_UNITS, type ChannelLaw, type TraceChannel } from './channels';
import type { FindingList } from './findings';
import type { ColumnMapping } from './mapping';
import { parseNumber, textOf } from './parse-number';
import type { CellSpans } from './row-splitter';
import { isNeverMeasured, isSensorMark } from './sentinels';

/** What loggers write where there is nothing to write. */
const BLANK_WORDS = new Set(['nan', 'null', 'none', 'nil', 'na', 'n/a', '-', '--', '---', '?']);
const LONGEST_BLANK_WORD = 4;

/** Reads the cells of one channel: the value in its own unit, or NaN, which is then counted with its reason. */
export class ValueReader {
	readonly channel: TraceChannel;
	private readonly column: number;
	private readonly law: ChannelLaw;
	private readonly isTemperature: boolean;
	private readonly shift: number;
	private readonly factor: number;
	/** The last value that was one: what 85 °C is held against. */
	private before = NaN;

	constructor(
		{ channel, column, unit, reversed }: ColumnMapping,
		private readonly at: number,
		private readonly decimal: number,
		private readonly findings: FindingList
	) {
		this.channel = channel;
		this.column = column;
		this.law = CHANNEL_LAWS[channel];
		this.isTemperature = this.law.quantity === 'temperature';
		const { shift, factor } = TRACE_UNITS[unit];
		this.shift = shift;
		this.factor = reversed ? -factor : factor;
	}

	read(row: CellSpans): number {
		const from = row.starts[this.column - 1]!;
		const to = row.ends[this.column - 1]!;
		const written = from < to ? parseNumber(row.bytes, from, to, this.decimal) : NaN;
		if (written !== written)
			return this.passOver(row, this.isBlankCell(row, from, to) ? 'blank' : 'unreadable');
		const value = (written + this.shift) * this.factor;
		if (isNeverMeasured(written) || (this.isTemperature && isSensorMark(value, this.before))) {
			return this.passOver(row, 'sentinel');
		}
		if (value < this.law.low || value > this.law.high) return this.passOver(row, 'impossible');
		this.findings.cells[this.at]!.values++;
		this.before = value;
		return value;
	}

	private isBlankCell({ bytes }: CellSpans, from: number, to: number): boolean {
		if (from >= to) return true;
		return to - from <= LONGEST_BLANK_WORD && BLANK_WORDS.has(textOf(bytes, from, to).toLowerCase());
	}

	private passOver(row: CellSpans, reason: 'blank' | 'unreadable' | 'sentinel' | 'impossible'): number {
		const [from, to] = [row.starts[this.column - 1]!, row.ends[this.column - 1]!];
		this.findings.dropCell(this.at, reason, row.line, this.column, () => textOf(row.bytes, from, to));
		return NaN;
	}
}
