import { formatNumber } from '../../../format/numbers';
import { listFigureTicks } from '../../../format/traces';
import { drawLine } from '../trace-plot/plot-drawing';

export const RESIDUAL_BOX = { width: 480, height: 170, left: 36, right: 8, top: 10, bottom: 24 } as const;

export interface ResidualSeries {
	/** Across: hours from the start, or °C. */
	x: readonly number[];
	before: readonly (number | null)[];
	after: readonly (number | null)[];
}

export interface ResidualDrawing {
	before: string;
	after: string;
	dots: { x: number; y: number }[];
	yTicks: { y: number; text: string; isZero: boolean }[];
	xTicks: { x: number; text: string }[];
}

const round = (value: number): number => Math.round(value * 10) / 10;

/** Model less reading, with the book's values and with the fitted ones, over one scale that holds zero. */
export function drawResiduals({ x, before, after }: ResidualSeries): ResidualDrawing {
	const { width, height, left, right, top, bottom } = RESIDUAL_BOX;
	const known = [...before, ...after].filter((value) => value !== null);
	const ticks = listFigureTicks(Math.min(0, ...known), Math.max(0.5, ...known), 4);
	const [low, high] = [ticks[0]!, ticks.at(-1)!];
	const [fromX, toX] = [Math.min(...x), Math.max(...x, Math.min(...x) + 1)];
	const yOf = (value: number) => height - bottom - ((value - low) / (high - low)) * (height - bottom - top);
	const xOf = (value: number) => left + ((value - fromX) / (toX - fromX)) * (width - left - right);
	const pointsOf = (values: readonly (number | null)[]) =>
		values.map((value, at) => (value === null ? null : ([xOf(x[at]!), yOf(value)] as const)));
	return {
		before: drawLine(pointsOf(before)),
		after: drawLine(pointsOf(after)),
		dots: pointsOf(after).flatMap((point) => (point ? [{ x: round(point[0]), y: round(point[1]) }] : [])),
		yTicks: ticks.map((value) => ({
			y: round(yOf(value)),
			text: formatNumber(value, Number.isInteger(value) ? 0 : 1),
			isZero: value === 0
		})),
		xTicks: listFigureTicks(fromX, toX, 5)
			.filter((value) => value >= fromX && value <= toX)
			.map((value) => ({ x: round(xOf(value)), text: formatNumber(value, Number.isInteger(value) ? 0 : 1) }))
	};
}
