import type { Wear } from '../assess/expected-life';
import { chemistryOf } from './table';
import type { ChemistryKey } from './types';

/** What the law of wear takes from a record. */
export interface WornBattery {
	chemistry: ChemistryKey;
	capacityAh: number;
	/** Life at 25 °C by its maker; without it the usual one of its kind. */
	ratedLifeYears?: number | null;
}

/**
 * By which law a battery wears, with its own rated life.
 *
 * @param battery chemistry, capacity in Ah, rated life in years
 * @returns the law; lead-acid with years at 25 °C and the charge of its life in Ah
 * Validity: as the models of ageing.
 * Source: the table of chemistries.
 * @example
 * wearOf({ chemistry: 'lead-acid-agm', capacityAh: 100, ratedLifeYears: 7 }).ratedLifeAh; // 25000
 */
export function wearOf({ chemistry, capacityAh, ratedLifeYears }: WornBattery): Wear {
	const { wear } = chemistryOf(chemistry);
	if (wear.law !== 'lead-acid') return wear;
	return {
		law: 'lead-acid',
		ratedLifeYears: ratedLifeYears ?? wear.usualLifeYears.value,
		ratedLifeAh: wear.lifeAhPerAh.value * capacityAh
	};
}
