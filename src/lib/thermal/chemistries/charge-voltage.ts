import { requireNotBelow } from '../correlations/require';
import { chemistryOf } from './table';
import type { ChemistryKey } from './types';

const REFERENCE_C = 25;
const LOWEST_C = -40;

/**
 * What a charger should give a battery at its temperature.
 *
 *     V = n (V25 + c (T − 25) / 1000)      (n cells, V25 in V a cell, c in mV/K a cell)
 *
 * @param key chemistry
 * @param tempC temperature of the cells, °C
 * @returns charging voltage of the whole battery, V
 * @throws EngineInputError below −40 °C
 * Validity: batteries of the 12 V class; makers follow the line up to about 50 °C and forbid charging beyond it.
 * Source: makers' guides (common practice); the table of chemistries has the numbers.
 * @example
 * chargeVoltageV('lead-acid-agm', 50); // 13.8
 */
export function chargeVoltageV(key: ChemistryKey, tempC: number): number {
	requireNotBelow(LOWEST_C, { tempC });
	const { cells, chargeVPerCell, compensationMvPerKPerCell } = chemistryOf(key);
	return (
		cells.value * (chargeVPerCell.value + (compensationMvPerKPerCell.value * (tempC - REFERENCE_C)) / 1000)
	);
}
