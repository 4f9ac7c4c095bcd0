import { formatHourTick } from '../../../format/time';
import { simplifyLine, type Box, type Point } from './geometry';
import { listLimits, watchesBoardAlone } from './limit-rows';
import { endHourOf, hourAt, type RibbonData, type RibbonHours } from './ribbon-data';
import { estimateTextWidth } from './text-width';

/** `mini` and `wide` are the low ones: in the survey and side by side. */
export type RibbonSize = 'mini' | 'wide' | 'phone' | 'desk' | 'print';

/** What differs between the places where the ribbon stands; lengths in px. */
export interface SizeSpec {
	width: number;
	height: number;
	fontPx: number;
	left: number;
	right: number;
	bottom: number;
	stripPx: number;
	/** From the strip's foot to the plot. */
	gapPx: number;
	cellsPx: number;
	tickGapPx: number;
	hatchPx: number;
	curveWords: boolean;
	peakWords: boolean;
	/** Words of the limits at the right end: one line, two short ones, or none. */
	limitWords: 'long' | 'short' | 'none';
}

export const RIBBON_SIZES: Record<RibbonSize, SizeSpec> = {
	mini: {
		width: 340,
		height: 176,
		fontPx: 12,
		left: 34,
		right: 12,
		bottom: 24,
		stripPx: 20,
		gapPx: 16,
		cellsPx: 3.2,
		tickGapPx: 56,
		hatchPx: 7,
		curveWords: false,
		peakWords: false,
		limitWords: 'none'
	},
	wide: {
		width: 760,
		height: 178,
		fontPx: 12.5,
		left: 38,
		right: 136,
		bottom: 26,
		stripPx: 20,
		gapPx: 18,
		cellsPx: 3.4,
		tickGapPx: 72,
		hatchPx: 7,
		curveWords: false,
		peakWords: true,
		limitWords: 'long'
	},
	phone: {
		width: 340,
		height: 280,
		fontPx: 12,
		left: 32,
		right: 52,
		bottom: 26,
		stripPx: 20,
		gapPx: 20,
		cellsPx: 3.4,
		tickGapPx: 56,
		hatchPx: 7,
		curveWords: true,
		peakWords: true,
		limitWords: 'short'
	},
	desk: {
		width: 1100,
		height: 380,
		fontPx: 13.5,
		left: 46,
		right: 148,
		bottom: 30,
		stripPx: 22,
		gapPx: 24,
		cellsPx: 4,
		tickGapPx: 88,
		hatchPx: 8,
		curveWords: true,
		peakWords: true,
		limitWords: 'long'
	},
	print: {
		width: 680,
		height: 280,
		fontPx: 11.5,
		left: 38,
		right: 124,
		bottom: 26,
		stripPx: 19,
		gapPx: 20,
		cellsPx: 3.2,
		tickGapPx: 66,
		hatchPx: 6.5,
		curveWords: true,
		peakWords: true,
		limitWords: 'long'
	}
};

/**
 * The width to draw for the room there is. Close to the size's own width the picture is scaled instead, so that
 * the live one takes exactly the place of the one that came with the page.
 */
export function widthToDraw(size: RibbonSize, roomPx: number): number {
	const own = RIBBON_SIZES[size].width;
	return roomPx >= own * 0.8 && roomPx <= own * 1.3 ? own : Math.round(roomPx);
}

export interface Tick {
	hour: number;
	x: number;
	word: string;
	align: 'left' | 'center' | 'right';
}

/** Where everything goes before anything is drawn. */
export interface RibbonFrame {
	size: RibbonSize;
	spec: SizeSpec;
	width: number;
	height: number;
	plot: Box;
	strip: Box;
	fromHour: number;
	toHour: number;
	minC: number;
	maxC: number;
	ticks: Tick[];
	tempTicksC: number[];
	x: (hour: number) => number;
	y: (tempC: number) => number;
}

const TEMP_STEP_C = 20;
/** So that the words of the peak have somewhere to stand. */
const ROOM_ABOVE_C = 6;
const HOUR_STEPS = [1, 2, 3, 4, 6, 12, 24];

export function layOutFrame(
	data: RibbonData,
	size: RibbonSize,
	width = RIBBON_SIZES[size].width,
	span = spanOf([data])
): RibbonFrame {
	const spec = RIBBON_SIZES[size];
	const plot: Box = {
		left: spec.left,
		right: width - spec.right,
		top: spec.stripPx + spec.gapPx + 1,
		bottom: spec.height - spec.bottom
	};
	const { fromHour, toHour, minC, maxC } = span;
	const x = (hour: number) =>
		plot.left + ((hour - fromHour) / (toHour - fromHour)) * (plot.right - plot.left);
	const y = (tempC: number) => plot.bottom - ((tempC - minC) / (maxC - minC)) * (plot.bottom - plot.top);
	const tempTicksC = [];
	for (let tempC = minC; tempC <= maxC; tempC += TEMP_STEP_C) tempTicksC.push(tempC);
	return {
		size,
		spec,
		width,
		height: spec.height,
		plot,
		strip: { left: plot.left, right: plot.right, top: 1, bottom: spec.stripPx + 1 },
		fromHour,
		toHour,
		minC,
		maxC,
		ticks: layOutTicks(fromHour, toHour, spec, { left: 2, right: width - 2 }, x),
		tempTicksC,
		x,
		y
	};
}

/** What the two axes cover. */
export interface RibbonSpan {
	fromHour: number;
	toHour: number;
	minC: number;
	maxC: number;
}

/** Axes that hold all the days given: side by side, one px is the same everywhere. */
export function spanOf(days: readonly RibbonData[]): RibbonSpan {
	const fromHour = Math.min(...days.map(({ curves }) => curves.startHour));
	const toHour = Math.max(...days.map(({ curves }) => endHourOf(curves)), fromHour + 0.5);
	const extremes = days.map(extremesOf);
	const minC = Math.floor(Math.min(...extremes.map(({ low }) => low)) / TEMP_STEP_C) * TEMP_STEP_C;
	const maxC = Math.max(...extremes.map(({ high }) => high)) + ROOM_ABOVE_C;
	return { fromHour, toHour, minC, maxC: Math.max(maxC, minC + TEMP_STEP_C) };
}

function extremesOf(data: RibbonData): { low: number; high: number } {
	const { curves, air, band } = data;
	const lines = [
		curves.ambientC,
		curves[air.curve],
		curves.caseC,
		curves.cellsC,
		band?.lowC ?? [],
		band?.highC ?? []
	];
	if (watchesBoardAlone(data)) lines.push(curves.boardC);
	const marked = listLimits(data).map(({ tempC }) => tempC);
	let [low, high] = [Math.min(...marked), Math.max(...marked)];
	for (const valuesC of lines) {
		for (const tempC of valuesC) {
			low = Math.min(low, tempC);
			high = Math.max(high, tempC);
		}
	}
	return { low, high };
}

/** Ticks on the clock, as many as have room, their words inside the picture. */
function layOutTicks(
	fromHour: number,
	toHour: number,
	spec: SizeSpec,
	edge: { left: number; right: number },
	x: (hour: number) => number
): Tick[] {
	const pxPerHour = x(1) - x(0);
	const step = HOUR_STEPS.find((hours) => hours * pxPerHour >= spec.tickGapPx) ?? 24;
	const ticks: Tick[] = [];
	for (let hour = Math.ceil(fromHour / step) * step; hour <= toHour + 1e-9; hour += step) {
		const word = formatHourTick(hour);
		const half = estimateTextWidth(word, spec.fontPx) / 2;
		const align = x(hour) - half < edge.left ? 'left' : x(hour) + half > edge.right ? 'right' : 'center';
		ticks.push({ hour, x: x(hour), word, align });
	}
	return ticks;
}

/** A point of a curve: where it is drawn, and what it says. */
export interface CurvePoint extends Point {
	hour: number;
	tempC: number;
}

/** Finer than anybody sees, at any size of screen or print. */
const CURVE_TOLERANCE_PX = 0.15;

/** A curve in the picture's own px, with no more points than it takes to draw it. */
export function lineOf(frame: RibbonFrame, hours: RibbonHours, valuesC: number[]): CurvePoint[] {
	const points = valuesC.map((tempC, i) => {
		const hour = hourAt(hours, i);
		return { hour, tempC, x: frame.x(hour), y: frame.y(tempC) };
	});
	return simplifyLine(points, CURVE_TOLERANCE_PX);
}
