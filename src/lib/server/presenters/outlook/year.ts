import { formatKelvin, formatNumber, formatTemperature } from '$lib/format/numbers';
import type { MonthReport, YearReport } from '$lib/schemas/outlook-reports';
import type { CutOutDays, TouringYear } from '$lib/thermal/outlook';
import { MONTH_NAMES } from '$lib/thermal/weather';
import { formatDays, formatMonthDays, sayDayCount, type EventWords } from '$lib/format/outlook-words';

/** The weather and the days on the road that the days were counted with. */
export type CountedYear = TouringYear & { basis: string };

function presentMonth({ months }: CutOutDays, { months: weather, daysOnRoad }: TouringYear, at: number) {
	const days = months[at]!;
	const { meanMaxC, spreadK } = weather[at]!;
	const name = MONTH_NAMES[at]!;
	return {
		...days,
		name,
		letter: name.charAt(0),
		daysOnRoad: formatNumber(daysOnRoad[at]!),
		warmth: `${formatTemperature(meanMaxC)} ± ${formatKelvin(spreadK)}`,
		value: formatMonthDays(days)
	} satisfies MonthReport;
}

function sayRoad(daysOnRoad: readonly number[]): string {
	const [least, most] = [Math.min(...daysOnRoad), Math.max(...daysOnRoad)];
	const each = least === most ? `${least} in each month` : `${least} to ${most} in a month`;
	return `Days on the road: ${each}; every one of them like the planned day, in the weather of its month.`;
}

/** Days in a year like the customer's, month by month. */
export function presentYear(
	days: CutOutDays,
	year: CountedYear,
	{ happens }: EventWords,
	place: string
): YearReport {
	const { samples, seed } = days;
	const onRoad = year.daysOnRoad.reduce((sum, each) => sum + each, 0);
	const value = formatDays(days.year);
	return {
		sentence: `On ${sayDayCount(days.year)} a year ${happens}, with ${formatNumber(onRoad)} days a year on the road around ${place}.`,
		value,
		months: MONTH_NAMES.map((_, at) => presentMonth(days, year, at)),
		basis: [year.basis, sayRoad(year.daysOnRoad)],
		method: `${samples} vehicles and mounts were drawn with the seed ${seed}; in brackets, and as the thin line, the range that holds four of five of them.`
	};
}
