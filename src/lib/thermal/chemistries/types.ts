import type { GassingBattery } from '../correlations/hydrogen';

export const CHEMISTRY_KEYS = [
	'lithium-iron-phosphate',
	'lithium-nickel-manganese-cobalt',
	'lithium-titanate',
	'lead-acid-agm',
	'lead-acid-gel',
	'lead-acid-flooded'
] as const;
export type ChemistryKey = (typeof CHEMISTRY_KEYS)[number];

/** How far a value can be trusted. */
export type Standing = 'read in the source' | 'from memory' | 'common practice' | 'engineering judgement';

/** A number of the table, in the unit that its column is named by. */
export interface Sourced {
	value: number;
	standing: Standing;
	source: string;
}

/** By which law it wears, with what is usual where a record says nothing. */
export type ChemistryWear =
	| { law: 'lithium-iron-phosphate' }
	| {
			law: 'lead-acid';
			/** Life in float service at 25 °C. */
			usualLifeYears: Sourced;
			/** Charge that it gives in its life, for each Ah of capacity. */
			lifeAhPerAh: Sourced;
	  }
	/** No published model of ours covers it. */
	| { law: 'none' };

/** What else somebody who fits or uses it must be told; the words stand with the other cautions. */
export const CHEMISTRY_CAUTIONS = [
	'failing-lithium',
	'fierce-fire',
	'vent-flooded',
	'vent-valve-regulated',
	'hot-charge',
	'acid'
] as const;
export type ChemistryCaution = (typeof CHEMISTRY_CAUTIONS)[number];

/** One row of the table. */
export interface Chemistry {
	key: ChemistryKey;
	label: string;
	family: 'lithium' | 'lead-acid';
	/** Whether electronics of its own switch it off when it is too hot. */
	hasBms: boolean;
	/** In series, in a battery of the 12 V class. */
	cells: Sourced;
	nominalV: Sourced;
	packSpecificHeatJPerKgK: Sourced;
	/** How much better the inside touches the case than in the pack of the coefficient book. */
	caseContactRatio: Sourced;
	/** R = r25 exp(activation (1/T − 1/298.15 K)). */
	activationK: Sourced;
	/** State of charge from which it takes less and less current. */
	taperSoc: Sourced;
	wear: ChemistryWear;
	/** Charging voltage of one cell at 25 °C, and by how much it changes with each kelvin. */
	chargeVPerCell: Sourced;
	compensationMvPerKPerCell: Sourced;
	/** Highest temperatures that makers usually allow; the record of a battery has its own. */
	highestChargeC: Sourced;
	highestUseC: Sourced;
	/** Which row of the table of gassing currents it follows; null where it gives off no gas in normal use. */
	gassing: GassingBattery | null;
	cautions: readonly ChemistryCaution[];
}
