/** January to December. */
export const MONTH_NAMES = [
	...(['January', 'February', 'March', 'April', 'May', 'June'] as const),
	...(['July', 'August', 'September', 'October', 'November', 'December'] as const)
] as const;

/** Days of the months in a year with a 29 February. */
export const MONTH_DAYS = [31, 29, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;
export const HOURS_A_DAY = 24;

/** Days before each month in a year with a 29 February. */
const DAYS_BEFORE = MONTH_DAYS.map((_, month) =>
	MONTH_DAYS.slice(0, month).reduce<number>((sum, days) => sum + days, 0)
);
export const LEAP_YEAR_DAYS = 366;
/** 29 February, counted from 0 at 1 January. */
export const LEAP_DAY = 31 + 28;

/** Where a day stands in a year with a 29 February, 0 at 1 January; month and day count from 1. */
export const dayOfLeapYear = (month: number, day: number): number => DAYS_BEFORE[month - 1]! + day - 1;

/** The month of a day of such a year, 0 for January. */
export function monthOfDay(dayOfYear: number): number {
	return DAYS_BEFORE.findLastIndex((before) => before <= dayOfYear);
}

/** "3 March 05:00", the hour that begins then, from an hour of such a year. */
export function sayHour(hourOfYear: number): string {
	const dayOfYear = Math.floor(hourOfYear / HOURS_A_DAY);
	const month = monthOfDay(dayOfYear);
	const day = dayOfYear - DAYS_BEFORE[month]! + 1;
	const clock = String(hourOfYear % HOURS_A_DAY).padStart(2, '0');
	return `${day} ${MONTH_NAMES[month]!} ${clock}:00`;
}
