import { TRACE_CHANNELS, type TraceChannel } from './channels';
import { shortenValue } from './trace-error';

/** Why a row is not among those kept. */
export const ROW_REASONS = {
	noTime: 'The time cannot be read.',
	shortRow: 'The row ends before its last column.',
	repeatedHeader: 'The header stands there once more.',
	repeated: 'The same time and the same values as a row before.',
	repeatedDiffering: 'The same time as a row before, with other values: the first is kept.',
	alreadyCovered: 'Far out of order, at a time that rows before have covered.'
} as const;
export type RowReason = keyof typeof ROW_REASONS;

/** Why a cell has no value. */
export const CELL_REASONS = {
	blank: 'Nothing stands there.',
	unreadable: 'No number stands there.',
	sentinel: 'A mark of the sensor or the logger for “nothing measured”.',
	impossible: 'No such value can be.',
	spike: 'A single value far from both neighbours.'
} as const;
export type CellReason = keyof typeof CELL_REASONS;

export interface TraceFinding {
	reason: RowReason | CellReason;
	/** Counted from 1. */
	line: number;
	/** Counted from 1; null where it concerns the row as a whole. */
	column: number | null;
	/** What stands there, cut short. */
	value: string;
}

export type CellCounts = { values: number } & Record<CellReason, number>;

/** So many findings of each reason are told; all are counted. */
export const FINDINGS_TOLD = 5;

const zeroes = <Key extends string>(keys: readonly Key[]): Record<Key, number> =>
	Object.fromEntries(keys.map((key) => [key, 0])) as Record<Key, number>;

/** Counts what is passed over, by reason, and remembers the first few places. */
export class FindingList {
	readonly dropped = zeroes(Object.keys(ROW_REASONS) as RowReason[]);
	readonly cells: readonly CellCounts[];
	readonly told: TraceFinding[] = [];
	private readonly toldOf = new Map<string, number>();

	constructor(channels: readonly TraceChannel[]) {
		const keys = ['values', ...Object.keys(CELL_REASONS)] as (keyof CellCounts)[];
		this.cells = channels.map(() => zeroes(keys));
	}

	dropRow(reason: RowReason, line: number, column: number | null, value: () => string): void {
		this.dropped[reason]++;
		this.tell(reason, line, column, value);
	}

	/** `channel` by its place among those that are read. */
	dropCell(channel: number, reason: CellReason, line: number, column: number, value: () => string): void {
		this.cells[channel]![reason]++;
		this.tell(reason, line, column, value);
	}

	private tell(
		reason: RowReason | CellReason,
		line: number,
		column: number | null,
		value: () => string
	): void {
		const told = this.toldOf.get(reason) ?? 0;
		if (told >= FINDINGS_TOLD) return;
		this.toldOf.set(reason, told + 1);
		this.told.push({ reason, line, column, value: shortenValue(value()) });
	}
}

/** In the order of all channels. */
export const inChannelOrder = (channels: Iterable<TraceChannel>): TraceChannel[] => {
	const given = new Set(channels);
	return TRACE_CHANNELS.filter((channel) => given.has(channel));
};
