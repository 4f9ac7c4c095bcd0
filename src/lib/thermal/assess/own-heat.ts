import { readResistanceFactor } from '../network/element-laws';
import type { Scenario } from '../types';
import type { BatteryNode, Moment } from './battery-network';

/** Heat that the battery's own current makes, W: i²R in the cells, whose resistance falls with temperature, and in the board. */
export function ownHeatW(
	{ battery }: Scenario,
	moment: Moment,
	currentA: number
): Partial<Record<BatteryNode, number>> {
	const cellOhm = battery.r25 * readResistanceFactor(battery.activationK, moment.tempOf('cells'));
	return { cells: currentA ** 2 * cellOhm, board: currentA ** 2 * battery.boardR };
}
