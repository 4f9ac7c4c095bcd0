import {
	gassingCurrentMaPerAh,
	hydrogenAirFlowM3PerH,
	sparkFreeDistanceMm,
	ventOpeningCm2
} from '../correlations/hydrogen';
import { chemistryOf } from './table';
import type { ChemistryKey } from './types';

/** What the gas of a battery asks of the place where it is charged. */
export interface GasNeeds {
	/** Fresh air while it is charged, m³/h. */
	freshAirM3PerH: number;
	/** Each of the two openings, one low and one high, cm². */
	openingCm2: number;
	/** Around its vents nothing may spark or glow within this, mm. */
	sparkFreeMm: number;
}

/**
 * Fresh air and openings for a battery that gives off hydrogen while it is charged quickly.
 *
 * @param key chemistry
 * @param capacityAh rated capacity, Ah
 * @returns what it needs; null for a chemistry that gives off no gas in normal use
 * @throws EngineInputError when the capacity is not above 0 or is above 5000 Ah
 * Validity: one battery of the 12 V class, charged at its boost voltage as its maker says; hotter or overcharged it gives off more.
 * Source: EN 50272-2:2001 / IEC 62485-2:2010, as the correlations of hydrogen.
 * @example
 * findGasNeeds('lead-acid-flooded', 100).openingCm2; // 16.8
 */
export function findGasNeeds(key: ChemistryKey, capacityAh: number): GasNeeds | null {
	const { gassing, cells } = chemistryOf(key);
	if (gassing === null) return null;
	const gassingMaPerAh = gassingCurrentMaPerAh(gassing, 'boost');
	const freshAirM3PerH = hydrogenAirFlowM3PerH({ cells: cells.value, gassingMaPerAh, capacityAh });
	return {
		freshAirM3PerH,
		openingCm2: ventOpeningCm2(freshAirM3PerH),
		sparkFreeMm: sparkFreeDistanceMm(gassingMaPerAh, capacityAh)
	};
}
