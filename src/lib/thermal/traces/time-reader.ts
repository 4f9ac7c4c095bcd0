import { secondsOfLocal } from './civil';
import { ClockCell, passToClock } from './clock-cell';
import { DateCell } from './date-cell';
import {
	COUNTED_TIMES,
	type CalendarMapping,
	type CountedTimeMapping,
	type TimeMapping,
	type TimeOfDayMapping,
	zoneOf
} from './mapping';
import { parseNumber } from './parse-number';
import type { CellSpans } from './row-splitter';
import { ZoneClock } from './zone-clock';

/** From when the seconds of a trace count: 1970 UTC, midnight of its first day, or nobody knows when. */
export const TIME_BASES = ['utc', 'time-of-day', 'elapsed'] as const;
export type TimeBase = (typeof TIME_BASES)[number];

/** Says what time a row is of: seconds, or NaN where it does not say. */
export interface TimeReader {
	readonly base: TimeBase;
	/** The zone whose offsets were used; null where none is needed. */
	readonly clock: ZoneClock | null;
	/** Column of the cell by which the last row without a time said none, counted from 1. */
	readonly wrongColumn: number;
	read(row: CellSpans): number;
}

const HOUR_S = 3600;
const DAY_S = 86_400;
const HALF_DAY_S = DAY_S / 2;

class CountedTimeReader implements TimeReader {
	readonly base: TimeBase;
	readonly clock: ZoneClock | null;
	readonly wrongColumn: number;
	private readonly secondsEach: number;
	private readonly at: number;

	constructor(
		time: CountedTimeMapping,
		private readonly decimal: number
	) {
		({ base: this.base, secondsEach: this.secondsEach } = COUNTED_TIMES[time.kind]);
		const zone = zoneOf(time);
		this.clock = zone === undefined ? null : new ZoneClock(zone);
		this.wrongColumn = time.column;
		this.at = time.column - 1;
	}

	read({ bytes, starts, ends }: CellSpans): number {
		const value = parseNumber(bytes, starts[this.at]!, ends[this.at]!, this.decimal);
		// Milliseconds by division: 0.001 itself is rounded.
		return this.secondsEach < 1 ? value / (1 / this.secondsEach) : value * this.secondsEach;
	}
}

class CalendarReader implements TimeReader {
	readonly base = 'utc';
	readonly clock: ZoneClock;
	wrongColumn: number;
	private readonly date: DateCell;
	private readonly timeOfDay = new ClockCell();
	private readonly dateAt: number;
	private readonly clockAt: number;

	constructor({ column, clockColumn, order, timeZone }: CalendarMapping) {
		this.clock = new ZoneClock(timeZone);
		this.date = new DateCell(order);
		this.wrongColumn = column;
		this.dateAt = column - 1;
		this.clockAt = clockColumn === null ? -1 : clockColumn - 1;
	}

	read({ bytes, starts, ends }: CellSpans): number {
		const { date, timeOfDay, dateAt, clockAt } = this;
		const dateEnd = ends[dateAt]!;
		this.wrongColumn = dateAt + 1;
		if (!date.read(bytes, starts[dateAt]!, dateEnd)) return NaN;
		const apart = clockAt >= 0;
		if (apart && date.end < dateEnd) return NaN;
		if (apart) this.wrongColumn = clockAt + 1;
		const from = apart ? starts[clockAt]! : passToClock(bytes, date.end, dateEnd);
		if (!timeOfDay.read(bytes, from, apart ? ends[clockAt]! : dateEnd)) return NaN;
		const localS = date.days * DAY_S + timeOfDay.secondOfDay;
		const { offsetS } = timeOfDay;
		return offsetS === offsetS ? localS - offsetS : this.clock.toUtcS(localS);
	}
}

class TimeOfDayReader implements TimeReader {
	readonly base: TimeBase;
	readonly clock: ZoneClock | null;
	readonly wrongColumn: number;
	private readonly timeOfDay = new ClockCell();
	private readonly at: number;
	private dayStartS: number;
	private days = 0;
	private beforeS = NaN;

	constructor({ column, firstDay, timeZone }: TimeOfDayMapping) {
		this.wrongColumn = column;
		this.at = column - 1;
		this.base = firstDay === null ? 'time-of-day' : 'utc';
		this.clock = firstDay === null ? null : new ZoneClock(timeZone);
		const [year, month, day] = (firstDay ?? '1970-01-01').split('-').map(Number) as [number, number, number];
		this.dayStartS = secondsOfLocal(year, month, day, 0);
	}

	read({ bytes, starts, ends }: CellSpans): number {
		if (!this.timeOfDay.read(bytes, starts[this.at]!, ends[this.at]!)) return NaN;
		const { secondOfDay } = this.timeOfDay;
		if (this.beforeS - secondOfDay > HALF_DAY_S) {
			this.dayStartS += DAY_S;
			this.days++;
		}
		// A row out of order just after midnight is of the day before, and no sign of yet another day.
		const isLate = this.days > 0 && this.beforeS < HOUR_S && secondOfDay > DAY_S - HOUR_S;
		const localS = this.dayStartS + secondOfDay - (isLate ? DAY_S : 0);
		if (!isLate) this.beforeS = secondOfDay;
		return this.clock === null ? localS : this.clock.toUtcS(localS);
	}
}

/** The reader that a mapping asks for; `decimal` is the byte of the decimal sign. */
export function makeTimeReader(time: TimeMapping, decimal: number): TimeReader {
	if (time.kind === 'calendar') return new CalendarReader(time);
	return time.kind === 'time-of-day' ? new TimeOfDayReader(time) : new CountedTimeReader(time, decimal);
}
