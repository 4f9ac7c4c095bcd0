import { formatTemperature } from '../../../format/numbers';
import type { RibbonFrame } from './frame';
import type { Mark } from './marks';
import type { RibbonData } from './ribbon-data';

/** A limit across the plot. */
export interface LimitLine {
	tempC: number;
	y: number;
	words: string;
	dash: number[];
	widthPx: number;
	ink: 'ink' | 'muted';
}

/** The battery's limits; those of charging only where heat stops it, and only when they are others. */
export function layOutLimits(frame: RibbonFrame, data: RibbonData): LimitLine[] {
	const { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC } = data.limits;
	const line = (tempC: number, words: string, dash: number[], ink: LimitLine['ink']): LimitLine => ({
		tempC,
		y: frame.y(tempC),
		words: `${words} ${formatTemperature(tempC)}`,
		dash,
		widthPx: ink === 'ink' ? 1.5 : 1,
		ink
	});
	const limits = [
		line(dischargeCutC, 'goes dark at', [], 'ink'),
		line(dischargeResetC, 'comes back at', [1.6, 3.6], 'ink')
	];
	if (!data.chargeSpans.length || frame.spec.limitWords === 'none') return limits;
	if (chargeCutC !== dischargeCutC) limits.push(line(chargeCutC, 'charge stops at', [], 'muted'));
	if (chargeResetC !== dischargeResetC)
		limits.push(line(chargeResetC, 'charges again at', [1.6, 3.6], 'muted'));
	return limits;
}

export const drawLimits = ({ plot }: RibbonFrame, limits: LimitLine[]): Mark[] =>
	limits.map(({ y, dash, widthPx, ink }) => ({
		kind: 'path',
		d: `M${plot.left} ${y.toFixed(1)}L${plot.right} ${y.toFixed(1)}`,
		stroke: ink,
		widthPx,
		dash,
		round: false
	}));
