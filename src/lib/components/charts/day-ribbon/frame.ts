import { formatHourTick } from '../../../format/time';
import { simplifyLine, type Box, type Point } from './geometry';
import { endHourOf, hourAt, type RibbonData } from './ribbon-data';
import { estimateTextWidth } from './text-width';

export type RibbonSize = 'mini' | 'phone' | 'desk' | 'print';

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
const HOUR_STEPS = [1, 2, 3, 4, 6, 12, 24];

export function layOutFrame(
	data: RibbonData,
	size: RibbonSize,
	width = RIBBON_SIZES[size].width
): RibbonFrame {
	const spec = RIBBON_SIZES[size];
	const plot: Box = {
		left: spec.left,
		right: width - spec.right,
		top: spec.stripPx + spec.gapPx + 1,
		bottom: spec.height - spec.bottom
	};
	const [minC, maxC] = temperatureSpan(data);
	const fromHour = data.curves.startHour;
	const toHour = Math.max(endHourOf(data.curves), fromHour + 0.5);
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

/** A whole step below the coolest, and room above the hottest for words. */
function temperatureSpan({ curves, limits, chargeSpans, band }: RibbonData): [number, number] {
	const all = [
		curves.ambientC,
		curves.bayC,
		curves.caseC,
		curves.cellsC,
		band?.lowC ?? [],
		band?.highC ?? []
	];
	let low = limits.dischargeResetC;
	let high = Math.max(limits.dischargeCutC, chargeSpans.length ? limits.chargeCutC : -Infinity);
	for (const valuesC of all) {
		for (const tempC of valuesC) {
			if (tempC < low) low = tempC;
			if (tempC > high) high = tempC;
		}
	}
	const minC = Math.floor(low / TEMP_STEP_C) * TEMP_STEP_C;
	return [minC, Math.max(high + 6, minC + TEMP_STEP_C)];
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
export function lineOf(frame: RibbonFrame, data: RibbonData, valuesC: number[]): CurvePoint[] {
	const points = valuesC.map((tempC, i) => {
		const hour = hourAt(data.curves, i);
		return { hour, tempC, x: frame.x(hour), y: frame.y(tempC) };
	});
	return simplifyLine(points, CURVE_TOLERANCE_PX);
}
