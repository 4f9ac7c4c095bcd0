import { formatTemperature } from '../../../format/numbers';
import type { RibbonFrame } from './frame';
import { listLimits, type LimitRow } from './limit-rows';
import type { Mark } from './marks';
import type { RibbonData } from './ribbon-data';

/** A limit across the plot. */
export interface LimitLine {
	y: number;
	/** What stands at its right end, line by line. */
	words: string[];
	dash: number[];
	ink: 'ink' | 'muted';
}

const COMES_BACK_DASH = [1.6, 3.6];

/** The battery's limits; of two at one place the lighter is left out, and extra ones where their words have no room. */
export function layOutLimits(frame: RibbonFrame, data: RibbonData): LimitLine[] {
	const rows = listLimits(data);
	const isShown = ({ tempC, line, isExtra }: LimitRow): boolean => {
		if (!isExtra) return true;
		const isTaken = rows.some((other) => !other.isExtra && other.line === line && other.tempC === tempC);
		return frame.spec.limitWords === 'long' && !isTaken;
	};
	return rows.filter(isShown).map(({ tempC, long, short, line, ink }) => {
		const figure = formatTemperature(tempC);
		const words = frame.spec.limitWords === 'short' ? [short, figure] : [`${long} ${figure}`];
		return { y: frame.y(tempC), words, dash: line === 'solid' ? [] : COMES_BACK_DASH, ink };
	});
}

export const drawLimits = ({ plot }: RibbonFrame, limits: LimitLine[]): Mark[] =>
	limits.map(({ y, dash, ink }) => ({
		kind: 'path',
		d: `M${plot.left} ${y.toFixed(1)}L${plot.right} ${y.toFixed(1)}`,
		stroke: ink,
		widthPx: ink === 'ink' ? 1.5 : 1,
		dash
	}));
