import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import type { Scenario } from '../types';
import type { BatteryNode, Moment } from './battery-network';

const REFERENCE_K = 298.15;

/** Heat that the battery's own current makes, W: i²R in the cells, whose resistance falls with temperature, and in the board. */
export function ownHeatW(
	{ battery }: Scenario,
	moment: Moment,
	currentA: number
): Partial<Record<BatteryNode, number>> {
	const kelvin = moment.tempOf('cells') + KELVIN_AT_ZERO_C;
	const cellOhm = battery.r25 * Math.exp(battery.activationK * (1 / kelvin - 1 / REFERENCE_K));
	return { cells: currentA ** 2 * cellOhm, board: currentA ** 2 * battery.boardR };
}
