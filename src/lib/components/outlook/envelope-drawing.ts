import type { EnvelopeFigure } from '../../schemas/outlook-reports';

export const ENVELOPE_BOX = { width: 340, height: 216, left: 30, right: 10, top: 20, bottom: 34 } as const;

export interface EnvelopeDrawing {
	/** The line up to which it rides the day out; empty where there is none. */
	line: string;
	band: string;
	xTicks: { hours: number; x: number }[];
	yTicks: { tempC: number; y: number }[];
	planned: { x: number; y: number; isLeft: boolean };
	/** Where the words below and above the line have room. */
	words: { x: number; below: number | null; above: number | null };
}

const STEP_C = 10;
const ROOM_C = 3;
const MOST_HOURS = 12;
const HOURS_STEP = 2;
const WORD_ROOM_PX = 26;

type Point = EnvelopeFigure['points'][number];

/** Round tens that hold the line, its band and the planned day. */
function spanC({ points, planned, triedC }: EnvelopeFigure): [number, number] {
	const known = points.flatMap(({ lowC, middleC, highC }) => [lowC, middleC, highC]);
	const all = [...known.filter((tempC) => tempC !== null), planned.maxC];
	const low = points.some(({ lowC }) => lowC === null) ? triedC[0] : Math.min(...all);
	return [
		Math.floor((low - ROOM_C) / STEP_C) * STEP_C,
		Math.ceil((Math.max(...all) + ROOM_C) / STEP_C) * STEP_C
	];
}

const round = (px: number): number => Math.round(px * 10) / 10;

/** Where the line of the hottest days that it rides out goes, its band, and the planned day. */
export function drawEnvelope(figure: EnvelopeFigure): EnvelopeDrawing {
	const { width, height, left, right, top, bottom } = ENVELOPE_BOX;
	const [minC, maxC] = spanC(figure);
	const foot = height - bottom;
	const longest = Math.max(MOST_HOURS, Math.ceil(figure.planned.driveHours));
	const x = (hours: number): number => round(left + (hours / longest) * (width - left - right));
	const y = (tempC: number): number => round(foot - ((tempC - minC) / (maxC - minC)) * (foot - top));
	const pathOf = (points: readonly Point[], tempOf: (point: Point) => number | null): string[] =>
		points.flatMap((point) => {
			const tempC = tempOf(point);
			return tempC === null ? [] : [`${x(point.driveHours)} ${y(tempC)}`];
		});
	const middle = pathOf(figure.points, ({ middleC }) => middleC);
	const upper = pathOf(figure.points, ({ highC }) => highC);
	// Where the band reaches below what was tried it goes down to the foot.
	const lower = pathOf(figure.points, ({ lowC, highC }) =>
		highC === null ? null : (lowC ?? minC)
	).reverse();
	const at = figure.points.find(({ driveHours }) => driveHours === 6) ?? figure.points[0];
	const lineY = at && at.middleC !== null ? y(at.middleC) : foot;
	return {
		line: middle.length > 1 ? `M${middle.join('L')}` : '',
		band: upper.length > 1 ? `M${[...upper, ...lower].join('L')}Z` : '',
		xTicks: Array.from({ length: Math.floor(longest / HOURS_STEP) + 1 }, (_, step) => ({
			hours: step * HOURS_STEP,
			x: x(step * HOURS_STEP)
		})),
		yTicks: Array.from({ length: Math.round((maxC - minC) / STEP_C) + 1 }, (_, step) => ({
			tempC: minC + step * STEP_C,
			y: y(minC + step * STEP_C)
		})),
		planned: {
			x: x(figure.planned.driveHours),
			y: y(figure.planned.maxC),
			isLeft: figure.planned.driveHours > longest / 2
		},
		words: {
			x: x(0.4),
			below: foot - lineY > WORD_ROOM_PX ? foot - 8 : null,
			above: lineY - top > WORD_ROOM_PX ? top + 8 : null
		}
	};
}
