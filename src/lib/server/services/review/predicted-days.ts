/** Installations that were fitted in one month, and how many dark days are expected of them. */
export interface Cohort {
	/** "2026-03". */
	month: string;
	/** From the day of fitting to the end of that month, together. */
	firstMonthDays: number;
	/** In a whole January, …, December, together. */
	monthDays: readonly number[];
}

export const monthOf = (day: string): string => day.slice(0, 7);

const MONTHS_A_YEAR = 12;

const indexOf = (month: string): number => {
	const [year = 0, number = 1] = month.split('-').map(Number);
	return year * MONTHS_A_YEAR + number - 1;
};

const monthAt = (index: number): string => {
	const year = Math.floor(index / MONTHS_A_YEAR);
	return `${String(year).padStart(4, '0')}-${String((index % MONTHS_A_YEAR) + 1).padStart(2, '0')}`;
};

/** From the one to the other, both included. */
export function listMonths(from: string, to: string): string[] {
	const first = indexOf(from);
	return Array.from({ length: Math.max(indexOf(to) - first + 1, 0) }, (_, at) => monthAt(first + at));
}

export const monthsBefore = (month: string, count: number): string => monthAt(indexOf(month) - count);

export function daysInMonth(day: string): number {
	const [year = 0, month = 1] = day.split('-').map(Number);
	return new Date(Date.UTC(year, month, 0)).getUTCDate();
}

/** The share of its month that has gone by at the end of a day. */
const goneBy = (day: string): number => Number(day.slice(8, 10)) / daysInMonth(day);

/**
 * Dark days to be expected of a cohort in one month, when today is the last day that counts:
 * nothing before it was fitted, in the month of fitting what is left of it, in the month of today what has gone by.
 */
export function predictInMonth(
	{ month, firstMonthDays, monthDays }: Cohort,
	asked: string,
	today: string
): number {
	if (asked < month || asked > monthOf(today)) return 0;
	const wholeDays = monthDays[Number(asked.slice(5, 7)) - 1]!;
	const days = asked === month ? firstMonthDays : wholeDays;
	if (asked !== monthOf(today)) return days;
	return Math.max(days - wholeDays * (1 - goneBy(today)), 0);
}

/** The same from the day of fitting to the end of today. */
export function predictUntil(cohort: Cohort, today: string): number {
	const current = monthOf(today);
	if (cohort.month > current) return 0;
	const first = predictInMonth(cohort, cohort.month, today);
	if (cohort.month === current) return first;
	const { monthDays } = cohort;
	const between = indexOf(current) - indexOf(cohort.month) - 1;
	const yearDays = monthDays.reduce((sum, days) => sum + days, 0);
	// The months between: whole years at once, and what is left over one by one.
	let days = first + Math.floor(between / MONTHS_A_YEAR) * yearDays;
	for (let month = 1; month <= between % MONTHS_A_YEAR; month++) {
		days += monthDays[(indexOf(cohort.month) + month) % MONTHS_A_YEAR]!;
	}
	return days + predictInMonth(cohort, current, today);
}
