import type { MonthReport } from '../../schemas/outlook-reports';

export const MONTHS_BOX = { width: 340, height: 168, left: 26, right: 4, top: 18, bottom: 24 } as const;

export interface MonthBar {
	x: number;
	width: number;
	top: number;
	height: number;
	/** The range, as a thin line. */
	lineX: number;
	lowY: number;
	highY: number;
}

export interface MonthsDrawing {
	bars: MonthBar[];
	ticks: { days: number; y: number }[];
}

/** So that a picture of next to nothing is not drawn as if it were much. */
const LEAST_TOP_DAYS = 2;
const FILL = 0.62;

/** A round number of days that holds all the bars, and the step of its ticks. */
function scaleFor(mostDays: number): { topDays: number; stepDays: number } {
	const stepDays = [1, 2, 5, 10].find((step) => mostDays <= 3 * step) ?? 15;
	return { topDays: Math.max(Math.ceil(mostDays / stepDays) * stepDays, LEAST_TOP_DAYS), stepDays };
}

/** Where the bars of a year go. */
export function layOutMonths(months: readonly MonthReport[]): MonthsDrawing {
	const { width, height, left, right, top, bottom } = MONTHS_BOX;
	const { topDays, stepDays } = scaleFor(
		Math.max(...months.map(({ high, middle }) => Math.max(high, middle)))
	);
	const foot = height - bottom;
	const y = (days: number): number => foot - (days / topDays) * (foot - top);
	const step = (width - left - right) / months.length;
	return {
		bars: months.map(({ low, middle, high }, at) => ({
			x: left + step * (at + (1 - FILL) / 2),
			width: step * FILL,
			top: y(middle),
			height: foot - y(middle),
			lineX: left + step * (at + 0.5),
			lowY: y(low),
			highY: y(high)
		})),
		ticks: Array.from({ length: topDays / stepDays + 1 }, (_, at) => ({
			days: at * stepDays,
			y: y(at * stepDays)
		}))
	};
}
