import { MONTH_DAYS } from '../weather/calendar';

const DAY_S = 86_400;
const FEBRUARY = 2;

const isLeapYear = (year: number): boolean => year % 4 === 0 && (year % 100 !== 0 || year % 400 === 0);

/** Days that a month has; 0 where there is no such month. */
export function daysOfMonth(year: number, month: number): number {
	const days = MONTH_DAYS[month - 1] ?? 0;
	return month === FEBRUARY && !isLeapYear(year) ? days - 1 : days;
}

/**
 * Days from 1 January 1970 to a date of the Gregorian calendar.
 *
 *     y' = y − [m ≤ 2],  d = 365 y' + ⌊y'/4⌋ − ⌊y'/100⌋ + ⌊y'/400⌋ + ⌊(153 (m + 9 mod 12) + 2)/5⌋ + day − 719469
 *
 * @param year in full
 * @param month 1 to 12
 * @param day 1 to 31
 * @returns whole days, negative before 1970
 * Validity: every date of the calendar; that the month has the day is not checked.
 * Source: Richards, Calendars, in Explanatory Supplement to the Astronomical Almanac, 3rd ed. (2013), ch. 15; months counted from March.
 * @example
 * daysSince1970(2000, 3, 1); // 11017
 */
export function daysSince1970(year: number, month: number, day: number): number {
	const fromMarch = month <= FEBRUARY ? year - 1 : year;
	const leapDays = Math.floor(fromMarch / 4) - Math.floor(fromMarch / 100) + Math.floor(fromMarch / 400);
	const daysToMonth = Math.floor((153 * ((month + 9) % 12) + 2) / 5);
	return 365 * fromMarch + leapDays + daysToMonth + day - 719_469;
}

/** Seconds from 1970 to a date and a second of its day, as if there were one clock everywhere. */
export function secondsOfLocal(year: number, month: number, day: number, secondOfDay: number): number {
	return daysSince1970(year, month, day) * DAY_S + secondOfDay;
}
