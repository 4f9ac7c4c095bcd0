import { MONTH_KEYS } from '../schemas/months';

/** "4 days each month", or "15 days a year: Jan 12, Jul 3". */
export function sayDaysOnRoad(days: readonly number[]): string {
	const [first = 0] = days;
	const sayCount = (count: number): string => (count === 1 ? '1 day' : `${count} days`);
	if (days.every((count) => count === first)) return `${sayCount(first)} each month`;
	const year = days.reduce((sum, count) => sum + count, 0);
	const months = MONTH_KEYS.flatMap((key, index) => (days[index] ? [`${key} ${days[index]}`] : []));
	return `${sayCount(year)} a year: ${months.join(', ')}`;
}
