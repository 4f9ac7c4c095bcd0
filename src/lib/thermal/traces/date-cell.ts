import { daysOfMonth, daysSince1970 } from './civil';
import type { DateOrder } from './mapping';
import { BYTE, isBlank, isDigit, textOf } from './parse-number';

/** Which of the three numbers of a date is its year, month and day. */
const PLACES: Readonly<Record<DateOrder, { year: number; month: number; day: number }>> = {
	ymd: { year: 0, month: 1, day: 2 },
	dmy: { year: 2, month: 1, day: 0 },
	mdy: { year: 2, month: 0, day: 1 }
};

const MONTHS = [...['jan', 'feb', 'mar', 'apr', 'may', 'jun'], ...['jul', 'aug', 'sep', 'oct', 'nov', 'dec']];

const FIRST_YEAR = 1970;
const LAST_YEAR = 2199;
/** Two digits from here on are of the century before. */
const CENTURY_TURNS_AT = 70;

const isLetter = (byte: number): boolean => (byte | 32) >= 97 && (byte | 32) <= 122;
const isBetween = (byte: number): boolean =>
	byte === BYTE.minus || byte === BYTE.slash || byte === BYTE.point || byte === BYTE.comma || isBlank(byte);

function fullYear(year: number, digits: number): number {
	if (digits === 4) return year;
	if (digits !== 2) return NaN;
	return year < CENTURY_TURNS_AT ? 2000 + year : 1900 + year;
}

/**
 * Reads dates: three numbers in one order, the month also as an English word, or the eight digits of ISO 8601 basic format.
 * `days` and `end` say what was read last.
 */
export class DateCell {
	/** Days since 1970; NaN where there is no date. */
	days = NaN;
	/** The byte after the date. */
	end = 0;
	private readonly numbers = new Float64Array(3);
	private readonly digits = new Uint8Array(3);

	constructor(private readonly order: DateOrder) {}

	/** Whether a date stands at `from`. */
	read(bytes: Uint8Array, from: number, to: number): boolean {
		this.days = NaN;
		this.end = from;
		for (let part = 0; part < 3; part++) {
			if (part > 0) this.passBetween(bytes, to);
			if (!this.readPart(part, bytes, to)) return false;
			if (part === 0 && this.digits[0] === 8) return this.splitBasic();
		}
		const { year, month, day } = PLACES[this.order];
		return this.take(
			fullYear(this.numbers[year]!, this.digits[year]!),
			this.numbers[month]!,
			this.numbers[day]!
		);
	}

	private passBetween(bytes: Uint8Array, to: number): void {
		while (this.end < to && isBetween(bytes[this.end]!)) this.end++;
	}

	private readPart(part: number, bytes: Uint8Array, to: number): boolean {
		const from = this.end;
		let value = 0;
		while (this.end < to && isDigit(bytes[this.end]!)) {
			value = value * 10 + bytes[this.end]! - BYTE.zero;
			this.end++;
		}
		if (this.end === from) return this.readMonthName(part, bytes, to);
		this.numbers[part] = value;
		this.digits[part] = Math.min(this.end - from, 255);
		return true;
	}

	private readMonthName(part: number, bytes: Uint8Array, to: number): boolean {
		const from = this.end;
		while (this.end < to && isLetter(bytes[this.end]!)) this.end++;
		const month = MONTHS.indexOf(textOf(bytes, from, Math.min(from + 3, this.end)).toLowerCase()) + 1;
		this.numbers[part] = month;
		this.digits[part] = 0;
		return month > 0 && part === PLACES[this.order].month;
	}

	/** 20240131 */
	private splitBasic(): boolean {
		const value = this.numbers[0]!;
		return this.take(Math.floor(value / 10_000), Math.floor(value / 100) % 100, value % 100);
	}

	private take(year: number, month: number, day: number): boolean {
		if (!(year >= FIRST_YEAR && year <= LAST_YEAR)) return false;
		if (day < 1 || day > daysOfMonth(year, month)) return false;
		this.days = daysSince1970(year, month, day);
		return true;
	}
}
