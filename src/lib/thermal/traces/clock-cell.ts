import { BYTE, isBlank, isDigit, textOf } from './parse-number';

const HOUR_S = 3600;
const MINUTE_S = 60;
const DAY_S = 86_400;
const [UPPER_A, UPPER_P, UPPER_M, UPPER_T] = [65, 80, 77, 84];
/** What may stand for "no offset" (ISO 8601, and as loggers write it). */
const UTC_WORDS = ['Z', 'UTC', 'GMT'];

const upper = (byte: number): number => (byte >= 97 && byte <= 122 ? byte - 32 : byte);

/**
 * Reads a time of day after ISO 8601: hh:mm, hh:mm:ss with a fraction after a point or a comma, hhmm or hhmmss; also of twelve
 * hours with AM or PM; with an offset (Z, ±hh, ±hhmm, ±hh:mm) or without. `secondOfDay` and `offsetS` say what was read last.
 */
export class ClockCell {
	/** 0 to 86,400. */
	secondOfDay = NaN;
	/** Local time less UTC, s; NaN where the cell does not say. */
	offsetS = NaN;
	private at = 0;
	private value = 0;

	/** Whether a time of day, and nothing else, stands from `from` to `to`. */
	read(bytes: Uint8Array, from: number, to: number): boolean {
		this.at = from;
		this.offsetS = NaN;
		if (!this.readClock(bytes, to)) return false;
		this.passBlanks(bytes, to);
		if (this.at < to && !this.readHalf(bytes, to)) return false;
		this.passBlanks(bytes, to);
		if (this.at < to && !this.readOffset(bytes, to)) return false;
		return this.at === to && this.secondOfDay <= DAY_S;
	}

	private readClock(bytes: Uint8Array, to: number): boolean {
		const digits = this.readDigits(bytes, to);
		if (digits === 6 || digits === 4) return this.splitBasic(digits) && this.addFraction(bytes, to);
		if (digits < 1 || digits > 2 || bytes[this.at] !== BYTE.colon || this.at >= to) return false;
		const hour = this.value;
		this.at++;
		if (this.readDigits(bytes, to) !== 2 || this.value >= 60) return false;
		this.secondOfDay = hour * HOUR_S + this.value * MINUTE_S;
		if (bytes[this.at] !== BYTE.colon || this.at >= to) return true;
		this.at++;
		// A minute may have a second 60: a leap second, taken as the first of the next minute.
		if (this.readDigits(bytes, to) !== 2 || this.value > 60) return false;
		this.secondOfDay += this.value;
		return this.addFraction(bytes, to);
	}

	private splitBasic(digits: number): boolean {
		const seconds = digits === 6 ? this.value % 100 : 0;
		const hoursAndMinutes = digits === 6 ? Math.floor(this.value / 100) : this.value;
		const minutes = hoursAndMinutes % 100;
		this.secondOfDay = Math.floor(hoursAndMinutes / 100) * HOUR_S + minutes * MINUTE_S + seconds;
		return minutes < 60 && seconds <= 60;
	}

	private addFraction(bytes: Uint8Array, to: number): boolean {
		const mark = bytes[this.at];
		if (this.at >= to || (mark !== BYTE.point && mark !== BYTE.comma)) return true;
		this.at++;
		const digits = this.readDigits(bytes, to);
		this.secondOfDay += this.value / 10 ** digits;
		return digits > 0 && digits <= 9;
	}

	/** AM or PM, if that is what stands here. */
	private readHalf(bytes: Uint8Array, to: number): boolean {
		const half = upper(bytes[this.at]!);
		if (half !== UPPER_A && half !== UPPER_P) return true;
		if (this.at + 1 >= to || upper(bytes[this.at + 1]!) !== UPPER_M) return false;
		this.at += 2;
		const hour = Math.floor(this.secondOfDay / HOUR_S);
		if (hour < 1 || hour > 12) return false;
		this.secondOfDay += ((half === UPPER_P ? 12 : 0) - (hour === 12 ? 12 : 0)) * HOUR_S;
		return true;
	}

	private readOffset(bytes: Uint8Array, to: number): boolean {
		const sign = bytes[this.at]!;
		if (sign !== BYTE.plus && sign !== BYTE.minus) {
			this.offsetS = 0;
			const isUtc = UTC_WORDS.includes(textOf(bytes, this.at, Math.min(to, this.at + 4)).toUpperCase());
			this.at = to;
			return isUtc;
		}
		this.at++;
		const digits = this.readDigits(bytes, to);
		let hours = digits === 4 ? Math.floor(this.value / 100) : this.value;
		let minutes = digits === 4 ? this.value % 100 : 0;
		if (digits === 2 && bytes[this.at] === BYTE.colon && this.at < to) {
			this.at++;
			if (this.readDigits(bytes, to) !== 2) return false;
			minutes = this.value;
		}
		if (sign === BYTE.minus) [hours, minutes] = [-hours, -minutes];
		this.offsetS = hours * HOUR_S + minutes * MINUTE_S;
		return (digits === 2 || digits === 4) && Math.abs(this.offsetS) <= 14 * HOUR_S;
	}

	private readDigits(bytes: Uint8Array, to: number): number {
		const from = this.at;
		this.value = 0;
		while (this.at < to && isDigit(bytes[this.at]!)) {
			this.value = this.value * 10 + bytes[this.at]! - BYTE.zero;
			this.at++;
		}
		return this.at - from;
	}

	private passBlanks(bytes: Uint8Array, to: number): void {
		while (this.at < to && isBlank(bytes[this.at]!)) this.at++;
	}
}

/** The first byte of the time of day behind a date: after blanks, a comma or the T of ISO 8601. */
export function passToClock(bytes: Uint8Array, from: number, to: number): number {
	let at = from;
	while (at < to && (isBlank(bytes[at]!) || bytes[at] === BYTE.comma || upper(bytes[at]!) === UPPER_T)) at++;
	return at;
}
