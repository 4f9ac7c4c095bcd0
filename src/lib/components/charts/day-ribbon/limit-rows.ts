import { isUseLimits } from '../../../format/heat-limits';
import type { RibbonData } from './ribbon-data';

/** A limit of the battery: where it lies, what it is called, and how heavily it is drawn. */
export interface LimitRow {
	tempC: number;
	long: string;
	short: string;
	/** Solid where something ends, dotted where it begins again. */
	line: 'solid' | 'dotted';
	/** Lighter where it concerns charging alone. */
	ink: 'ink' | 'muted';
	/** Left out where long words have no room. */
	isExtra: boolean;
}

const row = (tempC: number, long: string, short: string, more: Partial<LimitRow> = {}): LimitRow => ({
	...{ tempC, long, short, line: 'solid', ink: 'ink', isExtra: false },
	...more
});

/** The limits that matter on this day: those of charging only where heat stops it, or where nothing does. */
export function listLimits({ limits, chargeSpans }: Pick<RibbonData, 'limits' | 'chargeSpans'>): LimitRow[] {
	if (isUseLimits(limits)) {
		return [
			row(limits.highestUseC, 'too hot above', 'too hot'),
			row(limits.highestChargeC, 'no charge above', '', { ink: 'muted', isExtra: true })
		];
	}
	const main = [
		row(limits.dischargeCutC, 'goes dark at', 'dark at'),
		row(limits.dischargeResetC, 'comes back at', 'back at', { line: 'dotted' })
	];
	if (chargeSpans.length === 0) return main;
	const extra = { ink: 'muted', isExtra: true } as const;
	return [
		...main,
		row(limits.chargeCutC, 'charge stops at', '', extra),
		row(limits.chargeResetC, 'charges again at', '', { ...extra, line: 'dotted' })
	];
}

/** Whether the board of the BMS is worth a column of its own. */
export const watchesBoard = ({ limits }: Pick<RibbonData, 'limits'>): boolean =>
	!isUseLimits(limits) && limits.sensor !== 'cells';

/** Whether it is the board alone that the BMS measures. */
export const watchesBoardAlone = ({ limits }: Pick<RibbonData, 'limits'>): boolean =>
	!isUseLimits(limits) && limits.sensor === 'board';
