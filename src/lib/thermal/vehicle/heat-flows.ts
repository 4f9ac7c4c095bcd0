import { readHeats } from '../network/read-heats';
import type { Leg, NodeValues, Scenario } from '../types';
import { describeVehicle } from './describe-vehicle';
import { emptyDrive, findDrive, findLegConstants } from './leg-drive';

/** Heat along one named path, positive from `from` to `to`. */
export interface HeatFlow {
	name: string;
	/** A node, `outside`, `sky`, `exhaust gas`, `cooling`, `local air`, `guard panel`, or `current` for i²R. */
	from: string;
	to: string;
	heatW: number;
	/** Heat over temperature difference as it stands, W/K (of radiation the secant); null for a source. */
	conductanceWPerK: number | null;
}

const BATTERY_SIDE = new Set(['case', 'cells', 'board', 'shield', 'tray']);

/**
 * The heat ledger of the battery at one instant: every flow that begins or ends at case, cells, board, shield or tray.
 *
 * @param scenario whole scenario, as parseScenario gives it
 * @param temps temperature of each node, °C (a row of `hourly`, or one minute of the series; shield null without one)
 * @param hour clock hour; runs on past 24
 * @param leg the leg that runs at that hour
 * @param currentA battery current, A
 * @returns the flows with names, ends, heat in W and conductance in W/K
 * Validity: as the thermal model.
 * Source: the thermal model's node balances.
 * @example
 * const scenario = defaultScenario([{ minutes: 60 }]);
 * const temps = { engine: 90, exhaust: 250, bay: 70, bonnet: 60, enclosure: 40, shield: null, tray: 50, case: 50, cells: 45, board: 46 };
 * heatFlowsAt(scenario, temps, 12, scenario.legs[0], 0).find((flow) => flow.name === 'case to cells').heatW; // 12.5
 */
export function heatFlowsAt(
	scenario: Scenario,
	temps: NodeValues,
	hour: number,
	leg: Leg,
	currentA: number
): HeatFlow[] {
	const constants = findLegConstants(scenario, leg);
	const drive = findDrive(scenario, leg, constants, hour, emptyDrive());
	const network = describeVehicle(scenario, leg, constants, drive, currentA);
	return readHeats(network, temps).filter(({ from, to }) => BATTERY_SIDE.has(from) || BATTERY_SIDE.has(to));
}
