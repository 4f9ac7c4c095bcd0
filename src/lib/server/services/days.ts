/** Days without a time, as "2026-03-04". */
export const today = (now = new Date()): string => now.toISOString().slice(0, 10);

const DAY_MS = 86_400_000;

export const addDays = (day: string, days: number): string =>
	today(new Date(Date.parse(day) + days * DAY_MS));

export const daysBetween = (from: string, to: string): number => (Date.parse(to) - Date.parse(from)) / DAY_MS;

/** The same day some months later; the last of the month where that has no such day. */
export function addMonths(day: string, months: number): string {
	const [year = 0, month = 1, dayOfMonth = 1] = day.split('-').map(Number);
	const last = new Date(Date.UTC(year, month + months, 0)).getUTCDate();
	return today(new Date(Date.UTC(year, month - 1 + months, Math.min(dayOfMonth, last))));
}
