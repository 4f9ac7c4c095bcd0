import { HOURS_A_DAY, MONTH_DAYS, MONTH_NAMES, dayOfLeapYear } from './calendar';
import { readNeededCell, type CellLimits } from './read-cells';
import type { ProblemList } from './weather-problem';

/** Columns, counted from 1, that say the month, the day and the hour. */
export interface DateColumns {
	month: number;
	day: number;
	hour: number;
	/** Whether hours count 1 to 24, each by its end, or 0 to 23, each by its beginning. */
	firstHour: 0 | 1;
}

/** The hour of a year with a 29 February from three columns; undefined when one of them is wrong. */
export function readDateColumns(
	cells: readonly string[],
	line: number,
	{ month, day, hour, firstHour }: DateColumns,
	problems: ProblemList
): number | undefined {
	const read = (number: number, name: string, min: number, max: number): number | undefined => {
		const limits: CellLimits = { column: { number, name }, min, max, unit: '', isWhole: true };
		return readNeededCell(cells, line, limits, problems);
	};
	const monthOfYear = read(month, 'month', 1, 12);
	const dayOfMonth = read(day, 'day', 1, monthOfYear === undefined ? 31 : MONTH_DAYS[monthOfYear - 1]!);
	const hourOfDay = read(hour, 'hour', firstHour, HOURS_A_DAY - 1 + firstHour);
	if (monthOfYear === undefined || dayOfMonth === undefined || hourOfDay === undefined) return undefined;
	return dayOfLeapYear(monthOfYear, dayOfMonth) * HOURS_A_DAY + hourOfDay - firstHour;
}

const ISO_TIME = /^\d{4}-(\d\d)-(\d\d)[T ](\d\d):[0-5]\d(:[0-5]\d)?$/;
const ISO_LIMIT = 'a local time such as 2024-01-31T14:00, without a time zone';

/** The hour of a year with a 29 February from one column; undefined when there is no such time. */
export function readTimeColumn(
	cells: readonly string[],
	line: number,
	number: number,
	problems: ProblemList
): number | undefined {
	const column = { number, name: 'time' };
	const value = cells[number - 1] ?? '';
	const match = ISO_TIME.exec(value);
	if (!match) {
		problems.add({ kind: 'no-such-time', line, column, value, limit: ISO_LIMIT });
		return undefined;
	}
	const [month, day, hour] = match.slice(1, 4).map(Number) as [number, number, number];
	const days = MONTH_DAYS[month - 1];
	if (days === undefined || day < 1 || day > days || hour >= HOURS_A_DAY) {
		const limit = days === undefined ? 'in a month 01 to 12' : sayDays(month, days);
		problems.add({ kind: 'no-such-time', line, column, value, limit });
		return undefined;
	}
	return dayOfLeapYear(month, day) * HOURS_A_DAY + hour;
}

const sayDays = (month: number, days: number): string =>
	`on a day 01 to ${days} of ${MONTH_NAMES[month - 1]!}, at an hour 00 to 23`;
