import { ClockCell, passToClock } from './clock-cell';
import { DateCell } from './date-cell';
import { DATE_ORDERS, type DateOrder } from './mapping';
import { BYTE, parseNumber } from './parse-number';

export type CellKind = 'blank' | 'number' | 'date' | 'clock' | 'date-time' | 'text';

const encoder = new TextEncoder();
const clockCell = new ClockCell();
const dateCells = new Map(DATE_ORDERS.map((order) => [order, new DateCell(order)]));

/** What a cell says of a time, its date read in the order given. */
export interface TimeOfCell {
	kind: 'date' | 'date-time';
	days: number;
	hasOffset: boolean;
}

/** The date of a cell, or its date and time of day; null where it is neither. */
export function readTimeOf(cell: string, order: DateOrder): TimeOfCell | null {
	const bytes = encoder.encode(cell);
	const date = dateCells.get(order)!;
	if (!date.read(bytes, 0, bytes.length)) return null;
	const { days } = date;
	if (date.end === bytes.length) return { kind: 'date', days, hasOffset: false };
	if (!clockCell.read(bytes, passToClock(bytes, date.end, bytes.length), bytes.length)) return null;
	return { kind: 'date-time', days, hasOffset: !Number.isNaN(clockCell.offsetS) };
}

/** Whether a cell is a time of day; four bare digits are taken for a number. */
export function isClock(cell: string): boolean {
	const bytes = encoder.encode(cell);
	return cell.includes(':') && clockCell.read(bytes, 0, bytes.length);
}

/** The number of a cell with this decimal sign; NaN where there is none. */
export function numberOf(cell: string, decimal: string): number {
	const bytes = encoder.encode(cell);
	return bytes.length === 0 ? NaN : parseNumber(bytes, 0, bytes.length, decimal.charCodeAt(0));
}

/** What a cell looks like, whatever its decimal sign and the order of its date. */
export function findCellKind(cell: string): CellKind {
	if (cell === '') return 'blank';
	const bytes = encoder.encode(cell);
	const isNumber = [BYTE.point, BYTE.comma].some(
		(decimal) => !Number.isNaN(parseNumber(bytes, 0, bytes.length, decimal))
	);
	if (isNumber) return 'number';
	if (isClock(cell)) return 'clock';
	const time = DATE_ORDERS.map((order) => readTimeOf(cell, order)).find((each) => each !== null);
	return time?.kind ?? 'text';
}
