import { CHANNEL_LAWS, TRACE_CHANNELS, TRACE_UNITS, type TraceChannel, type TraceUnit } from './channels';
import { TraceError, type TraceErrorCode } from './trace-error';
import { isTimeZone } from './zone-clock';

export const DELIMITERS = [',', ';', '\t', '|'] as const;
export type Delimiter = (typeof DELIMITERS)[number];
export const DECIMALS = ['.', ','] as const;
export type Decimal = (typeof DECIMALS)[number];

/** In which order a date names year, month and day. */
export const DATE_ORDERS = ['ymd', 'dmy', 'mdy'] as const;
export type DateOrder = (typeof DATE_ORDERS)[number];

/** How the values of a counting column become seconds: value × factor. */
export const COUNTED_TIMES = {
	'epoch-s': { secondsEach: 1, base: 'utc' },
	'epoch-ms': { secondsEach: 1e-3, base: 'utc' },
	'elapsed-s': { secondsEach: 1, base: 'elapsed' },
	'elapsed-min': { secondsEach: 60, base: 'elapsed' }
} as const;

/** Counted from 1970 UTC, so that the instant is known. */
export interface EpochMapping {
	kind: 'epoch-s' | 'epoch-ms';
	column: number;
	/** IANA name of the zone where the vehicle was, for the time of day; UTC where nothing is said. */
	timeZone?: string | undefined;
}

/** Counted from the start of the file. */
export interface ElapsedMapping {
	kind: 'elapsed-s' | 'elapsed-min';
	column: number;
}

export type CountedTimeMapping = EpochMapping | ElapsedMapping;

/** A date and a time of day, in one column or in two; an offset in the cell comes before the zone. */
export interface CalendarMapping {
	kind: 'calendar';
	column: number;
	/** Of the time of day where it has a column of its own. */
	clockColumn: number | null;
	order: DateOrder;
	/** IANA name, such as Australia/Darwin. */
	timeZone: string;
}

/** A time of day alone; a new day begins where it falls back by more than half a day. */
export interface TimeOfDayMapping {
	kind: 'time-of-day';
	column: number;
	/** Date of the first row, yyyy-mm-dd; null where nobody knows. */
	firstDay: string | null;
	timeZone: string;
}

/** Where a row says its time. Columns count from 1. */
export type TimeMapping = CountedTimeMapping | CalendarMapping | TimeOfDayMapping;

export interface ColumnMapping {
	/** Counted from 1. */
	column: number;
	channel: TraceChannel;
	unit: TraceUnit;
	/** The logger counts current positive while the battery gives. */
	reversed?: boolean;
}

/** How a logger writes. Plain JSON, so that it can be remembered. */
export interface TraceMapping {
	version: 1;
	delimiter: Delimiter;
	decimal: Decimal;
	time: TimeMapping;
	columns: ColumnMapping[];
}

export const MOST_COLUMNS = 256;

function refuse(code: TraceErrorCode, column: number | null, value: unknown, limit: string): never {
	throw new TraceError({ code, line: null, column, value: String(value), limit });
}

function requireColumn(column: unknown, what: string): void {
	const isColumn = Number.isInteger(column) && (column as number) >= 1 && (column as number) <= MOST_COLUMNS;
	if (!isColumn)
		refuse('wrong_mapping', null, column, `${what} as a whole number within 1 to ${MOST_COLUMNS}`);
}

function requireOneOf(value: unknown, choices: readonly unknown[], what: string): void {
	if (!choices.includes(value)) refuse('wrong_mapping', null, value, `${what}, one of ${choices.join(' ')}`);
}

const DAY = /^\d{4}-\d{2}-\d{2}$/;

/**
 * The time zone that a mapping names.
 *
 * @param time where a row says its time
 * @returns IANA name; undefined where it names none
 * Validity: every mapping.
 * Source: this program's own form of a mapping; names after the IANA time zone database.
 * @example
 * zoneOf({ kind: 'epoch-s', column: 1, timeZone: 'Australia/Darwin' }); // 'Australia/Darwin'
 * zoneOf({ kind: 'elapsed-s', column: 1 }); // undefined
 */
export function zoneOf(time: TimeMapping): string | undefined {
	return 'timeZone' in time ? time.timeZone : undefined;
}

function checkTime(time: TimeMapping): void {
	if (typeof time !== 'object' || time === null)
		refuse('no_time_column', null, time, 'a column with the time');
	const kinds = [...Object.keys(COUNTED_TIMES), 'calendar', 'time-of-day'];
	requireOneOf(time.kind, kinds, 'a kind of time');
	requireColumn(time.column, 'the column of the time');
	const isCounted = time.kind !== 'calendar' && time.kind !== 'time-of-day';
	const zone = zoneOf(time);
	const needsZone = !isCounted || zone !== undefined;
	if (needsZone && !isTimeZone(zone)) {
		refuse('no_such_zone', time.column, zone, 'the IANA name of a time zone, such as Australia/Darwin');
	}
	if (isCounted) return;
	if (time.kind === 'time-of-day') {
		if (time.firstDay !== null && !DAY.test(time.firstDay)) {
			refuse('wrong_mapping', time.column, time.firstDay, 'the first day as yyyy-mm-dd, or null');
		}
		return;
	}
	requireOneOf(time.order, DATE_ORDERS, 'an order of the date');
	if (time.clockColumn !== null) requireColumn(time.clockColumn, 'the column of the time of day');
}

function checkColumn({ column, channel, unit }: ColumnMapping): void {
	requireColumn(column, `the column of ${channel}`);
	requireOneOf(channel, TRACE_CHANNELS, 'a channel');
	requireOneOf(unit, Object.keys(TRACE_UNITS), 'a unit');
	if (TRACE_UNITS[unit].quantity !== CHANNEL_LAWS[channel].quantity) {
		refuse('wrong_mapping', column, unit, `a unit of ${CHANNEL_LAWS[channel].quantity} for ${channel}`);
	}
}

/** Columns that the time takes. */
export function timeColumnsOf(time: TimeMapping): number[] {
	const clockColumn = time.kind === 'calendar' ? time.clockColumn : null;
	return clockColumn === null ? [time.column] : [time.column, clockColumn];
}

function checkTwice(mapping: TraceMapping): void {
	const columns = [...timeColumnsOf(mapping.time), ...mapping.columns.map(({ column }) => column)];
	const twice = columns.find((column, at) => columns.indexOf(column) !== at);
	if (twice !== undefined) refuse('wrong_mapping', twice, `column ${twice} twice`, 'each column once');
	const channels = mapping.columns.map(({ channel }) => channel);
	const again = channels.find((channel, at) => channels.indexOf(channel) !== at);
	if (again !== undefined) refuse('wrong_mapping', null, `${again} twice`, 'each channel once');
}

/**
 * Refuses a mapping that no file could be read with.
 *
 * @param mapping how a logger writes, as somebody confirmed it or as it was remembered
 * @throws TraceError wrong_mapping, no_time_column or no_such_zone, with the column where there is one
 * Validity: says nothing about a file; that a column is there is seen when it is read.
 * Source: rules of this engine.
 * @example
 * const time = { kind: 'epoch-s', column: 1 };
 * const columns = [{ column: 2, channel: 'cellC', unit: '°C' }];
 * checkMapping({ version: 1, delimiter: ',', decimal: '.', time, columns }); // undefined
 */
export function checkMapping(mapping: TraceMapping): void {
	requireOneOf(mapping.version, [1], 'a version of the mapping');
	requireOneOf(mapping.delimiter, DELIMITERS, 'a delimiter');
	requireOneOf(mapping.decimal, DECIMALS, 'a decimal sign');
	checkTime(mapping.time);
	if (!Array.isArray(mapping.columns) || mapping.columns.length === 0) {
		refuse('wrong_mapping', null, 'no columns', 'at least one column with a channel');
	}
	mapping.columns.forEach(checkColumn);
	checkTwice(mapping);
}
