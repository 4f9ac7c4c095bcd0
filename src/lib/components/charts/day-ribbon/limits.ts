import { formatTemperature } from '../../../format/numbers';
import type { RibbonFrame } from './frame';
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

/** The battery's limits; those of charging only where heat stops it, and where their words have room. */
export function layOutLimits(frame: RibbonFrame, data: RibbonData): LimitLine[] {
	const { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC } = data.limits;
	const words = (long: string, short: string, tempC: number) => {
		const figure = formatTemperature(tempC);
		return frame.spec.limitWords === 'short' ? [short, figure] : [`${long} ${figure}`];
	};
	const limits: LimitLine[] = [
		{
			y: frame.y(dischargeCutC),
			words: words('goes dark at', 'dark at', dischargeCutC),
			dash: [],
			ink: 'ink'
		},
		{
			y: frame.y(dischargeResetC),
			words: words('comes back at', 'back at', dischargeResetC),
			dash: COMES_BACK_DASH,
			ink: 'ink'
		}
	];
	if (!data.chargeSpans.length || frame.spec.limitWords !== 'long') return limits;
	if (chargeCutC !== dischargeCutC)
		limits.push({
			y: frame.y(chargeCutC),
			words: [`charge stops at ${formatTemperature(chargeCutC)}`],
			dash: [],
			ink: 'muted'
		});
	if (chargeResetC !== dischargeResetC)
		limits.push({
			y: frame.y(chargeResetC),
			words: [`charges again at ${formatTemperature(chargeResetC)}`],
			dash: COMES_BACK_DASH,
			ink: 'muted'
		});
	return limits;
}

export const drawLimits = ({ plot }: RibbonFrame, limits: LimitLine[]): Mark[] =>
	limits.map(({ y, dash, ink }) => ({
		kind: 'path',
		d: `M${plot.left} ${y.toFixed(1)}L${plot.right} ${y.toFixed(1)}`,
		stroke: ink,
		widthPx: ink === 'ink' ? 1.5 : 1,
		dash
	}));
