import {
	listFigureTicks,
	listTimeTicks,
	quantityOf,
	UNIT_OF,
	type Quantity,
	type TraceClock
} from '../../../format/traces';
import { formatNumber } from '../../../format/numbers';
import type { ChannelCurve, CurveView } from '../../../schemas/traces';
import type { TraceChannel } from '../../../thermal/traces';

/** Where things stand in the picture, px. */
export const PLOT = { left: 40, right: 12, top: 22, gap: 34, foot: 26 } as const;
const HEIGHTS: Readonly<Record<Quantity, number>> = { temperature: 260, current: 84, speed: 84 };
const QUANTITIES: readonly Quantity[] = ['temperature', 'current', 'speed'];
const TICKS: Readonly<Record<Quantity, number>> = { temperature: 5, current: 2, speed: 2 };
/** So many pixels a word of the time axis takes. */
const TIME_TICK_PX = 76;
const HALF_TICK_PX = 30;

/** Told apart by their dashes and their weight, as the paper has no colours. */
export const CHANNEL_LOOKS: Readonly<Record<TraceChannel, { dash: string; width: number }>> = {
	ambientC: { dash: '1.5 3', width: 1.5 },
	bayAirC: { dash: '8 3', width: 1.5 },
	exhaustShieldC: { dash: '8 3 1.5 3', width: 1.5 },
	caseC: { dash: '', width: 1.25 },
	cellC: { dash: '', width: 2.75 },
	boardC: { dash: '3 2', width: 2 },
	currentA: { dash: '', width: 1.5 },
	speedKmh: { dash: '', width: 1.5 }
};

export interface PlotLine {
	channel: TraceChannel;
	line: string;
	/** From lowest to highest; empty where each point is one value. */
	band: string;
}

export interface PlotPanel {
	quantity: Quantity;
	title: string;
	top: number;
	bottom: number;
	ticks: { y: number; text: string }[];
	lines: PlotLine[];
}

export interface PlotDrawing {
	width: number;
	height: number;
	left: number;
	right: number;
	panels: PlotPanel[];
	timeTicks: { x: number; text: string; anchor: 'middle' | 'end' }[];
}

const round = (value: number): number => Math.round(value * 10) / 10;

/** Stretches of points one after another that have a value. */
function stretchesOf(values: readonly (number | null)[]): number[][] {
	const stretches: number[][] = [];
	values.forEach((value, at) => {
		if (value === null) return;
		if (at > 0 && values[at - 1] !== null && stretches.length > 0) stretches.at(-1)!.push(at);
		else stretches.push([at]);
	});
	return stretches;
}

/** A line through the points, broken where nothing was measured; a point alone is drawn as a dot. */
export function drawLine(points: readonly (readonly [number, number] | null)[]): string {
	let path = '';
	points.forEach((point, at) => {
		if (point === null) return;
		const [x, y] = point;
		const before = at > 0 ? points[at - 1] : null;
		path += `${before ? 'L' : 'M'}${round(x)} ${round(y)}`;
		if (!before && !points[at + 1]) path += 'h0.5';
	});
	return path;
}

function drawChannel({ channel, timeS, mean, min, max }: ChannelCurve, x: Scale, y: Scale): PlotLine {
	const points = mean.map((value, at) => (value === null ? null : ([x(timeS[at]!), y(value)] as const)));
	const hasBand = min.some((value, at) => value !== null && value !== max[at]);
	const band = hasBand
		? stretchesOf(mean)
				.map((stretch) => {
					const there = stretch.map((at) => `${round(x(timeS[at]!))} ${round(y(max[at]!))}`);
					const back = stretch.map((at) => `${round(x(timeS[at]!))} ${round(y(min[at]!))}`).reverse();
					return `M${[...there, ...back].join('L')}Z`;
				})
				.join('')
		: '';
	return { channel, line: drawLine(points), band };
}

type Scale = (value: number) => number;

function rangeOf(curves: readonly ChannelCurve[]): [number, number] {
	let [low, high] = [Infinity, -Infinity];
	for (const { min, max } of curves) {
		for (const value of min) if (value !== null && value < low) low = value;
		for (const value of max) if (value !== null && value > high) high = value;
	}
	return low > high ? [0, 1] : [low, Math.max(high, low + 1)];
}

/** Where a time stands in the picture, and which time stands at a place. */
export function timeScale(
	{ fromS, toS }: Pick<CurveView, 'fromS' | 'toS'>,
	width: number
): { xOf: Scale; atOf: Scale } {
	const [left, right] = [PLOT.left, width - PLOT.right];
	const perS = (right - left) / (toS - fromS);
	return { xOf: (atS) => left + (atS - fromS) * perS, atOf: (x) => fromS + (x - left) / perS };
}

/** A panel for each quantity that is shown, one under another over the same time. */
export function drawPlot(curve: CurveView, clock: TraceClock, width: number): PlotDrawing {
	const { xOf } = timeScale(curve, width);
	let top: number = PLOT.top;
	const panels: PlotPanel[] = [];
	for (const quantity of QUANTITIES) {
		const curves = curve.curves.filter(({ channel }) => quantityOf(channel) === quantity);
		if (curves.length === 0) continue;
		const ticks = listFigureTicks(...rangeOf(curves), TICKS[quantity]);
		const bottom = top + HEIGHTS[quantity];
		const [low, high] = [ticks[0]!, ticks.at(-1)!];
		const yOf = (
			(from) => (value: number) =>
				bottom - ((value - low) / (high - low)) * (bottom - from)
		)(top);
		panels.push({
			...{ quantity, top, bottom, title: UNIT_OF[quantity] },
			ticks: ticks.map((value) => ({
				y: round(yOf(value)),
				text: formatNumber(value, Number.isInteger(value) ? 0 : 1)
			})),
			lines: curves.map((each) => drawChannel(each, xOf, yOf))
		});
		top = bottom + PLOT.gap;
	}
	const most = Math.max(Math.floor((width - PLOT.left - PLOT.right) / TIME_TICK_PX), 2);
	return {
		...{ width, height: top - PLOT.gap + PLOT.foot, left: PLOT.left, right: width - PLOT.right, panels },
		timeTicks: listTimeTicks(clock, curve.fromS, curve.toS, most).map(({ atS, text }) => ({
			x: round(xOf(atS)),
			text,
			// A word in the last corner would be cut off.
			anchor: width - xOf(atS) < HALF_TICK_PX ? ('end' as const) : ('middle' as const)
		}))
	};
}

export interface Window {
	fromS: number;
	toS: number;
}

/** Nobody looks at less, s. */
const SHORTEST_WINDOW_S = 20;

/** The same window nearer (below 1) or farther about a time, moved back into the trace and never beyond it. */
export function zoomWindow(
	{ fromS, toS }: Window,
	whole: Window,
	factor: number,
	aboutS = (fromS + toS) / 2
): Window {
	const length = Math.min(Math.max((toS - fromS) * factor, SHORTEST_WINDOW_S), whole.toS - whole.fromS);
	const share = (aboutS - fromS) / (toS - fromS);
	return placeWindow(aboutS - share * length, length, whole);
}

/** The same length, moved along by a share of itself. */
export function moveWindow({ fromS, toS }: Window, whole: Window, share: number): Window {
	return placeWindow(fromS + share * (toS - fromS), toS - fromS, whole);
}

function placeWindow(fromS: number, length: number, whole: Window): Window {
	const from = Math.min(Math.max(fromS, whole.fromS), whole.toS - length);
	return { fromS: Math.round(from), toS: Math.round(from + length) };
}
