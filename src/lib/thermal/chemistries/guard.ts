import type { BmsSettings, Sensor } from '../types';
import { chemistryOf } from './table';
import type { ChemistryKey } from './types';

/** The highest that the table of fields lets a cut-off be: where the latches of a battery without a BMS stand. */
export const NEVER_CUT_C = 1000;

/**
 * Whether electronics stand behind the limits of a scenario: without them nothing measures or switches.
 *
 * @param bms the latches of a scenario, °C
 * @returns false where the charge latch stands at 1000 °C
 * Validity: scenarios that were built from a record, or written by who knows this.
 * Source: our own.
 * @example
 * hasLatches({ charge: { cut: 60, reset: 50 } }); // true
 */
export const hasLatches = ({ charge }: Pick<BmsSettings, 'charge'>): boolean => charge.cut < NEVER_CUT_C;

/** What a record says of heat: of a battery with a BMS its cut-offs, of one without its limits; the rest is empty. */
export interface HeatFields {
	chemistry: ChemistryKey;
	sensor: Sensor | null;
	chargeCutC: number | null;
	chargeResetC: number | null;
	dischargeCutC: number | null;
	dischargeResetC: number | null;
	cutDelayS: number | null;
	autoReset: boolean | null;
	highestChargeC?: number | null;
	highestUseC?: number | null;
	ratedLifeYears?: number | null;
	compensatesCharge?: boolean | null;
}

export const CUT_OFF_FIELDS = [
	'sensor',
	'chargeCutC',
	'chargeResetC',
	'dischargeCutC',
	'dischargeResetC',
	'cutDelayS',
	'autoReset'
] as const;
export const HEAT_LIMIT_FIELDS = [
	'highestChargeC',
	'highestUseC',
	'ratedLifeYears',
	'compensatesCharge'
] as const;
type CutOffField = (typeof CUT_OFF_FIELDS)[number];
type HeatLimitField = (typeof HEAT_LIMIT_FIELDS)[number];

type Filled<K extends keyof HeatFields> = { [F in K]: NonNullable<HeatFields[F]> };

/** Electronics of its own switch it off: nothing is left to judge but when. */
export type CutOffs = { kind: 'cut-offs' } & Filled<CutOffField>;
/** Nothing switches it off: whether it may be as hot as it gets is a matter of its limits. */
export type HeatLimits = { kind: 'heat-limits'; chemistry: ChemistryKey } & Filled<HeatLimitField>;
export type HeatGuard = CutOffs | HeatLimits;

/**
 * The fields of a record that a battery of this chemistry has.
 *
 * @param chemistry its key in the table
 * @returns the cut-offs of a battery with a BMS, the limits of one without
 * Validity: keys of the table.
 * Source: the table of chemistries.
 * @example
 * heatFieldsOf('lead-acid-agm').includes('highestUseC'); // true
 */
export function heatFieldsOf(chemistry: ChemistryKey): readonly (CutOffField | HeatLimitField)[] {
	return chemistryOf(chemistry).hasBms ? CUT_OFF_FIELDS : HEAT_LIMIT_FIELDS;
}

function fill<K extends keyof HeatFields>(battery: HeatFields, keys: readonly K[]): Filled<K> {
	const missing = keys.filter((key) => battery[key] === null || battery[key] === undefined);
	if (missing.length > 0) {
		throw new Error(`A battery record of the chemistry ${battery.chemistry} has no ${missing.join(', ')}.`);
	}
	return Object.fromEntries(keys.map((key) => [key, battery[key]])) as Filled<K>;
}

/**
 * What stands between a battery and its heat: the cut-offs of its BMS, or, without one, the limits of its maker.
 *
 * @param battery the record, °C, s and years
 * @returns cut-offs or heat limits, every field filled
 * Validity: records that were let in by the schema of batteries.
 * Source: the table of chemistries says which of the two a battery has.
 * @example
 * const noBms = { sensor: null, cutDelayS: null, autoReset: null };
 * const noCuts = { chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null };
 * const limits = { highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: true };
 * guardOf({ chemistry: 'lead-acid-agm', ...noBms, ...noCuts, ...limits }).kind; // 'heat-limits'
 */
export function guardOf(battery: HeatFields): HeatGuard {
	return chemistryOf(battery.chemistry).hasBms
		? { kind: 'cut-offs', ...fill(battery, CUT_OFF_FIELDS) }
		: {
				kind: 'heat-limits',
				chemistry: battery.chemistry,
				...fill(battery, HEAT_LIMIT_FIELDS)
			};
}

/**
 * The limits of a battery that nothing switches off.
 *
 * @param battery the record
 * @returns its limits; null for one with a BMS
 * Validity: as guardOf.
 * Source: as guardOf.
 * @example
 * const noBms = { sensor: null, cutDelayS: null, autoReset: null };
 * const noCuts = { chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null };
 * const limits = { highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: true };
 * heatLimitsOf({ chemistry: 'lead-acid-agm', ...noBms, ...noCuts, ...limits }).highestUseC; // 60
 */
export function heatLimitsOf(battery: HeatFields): HeatLimits | null {
	const guard = guardOf(battery);
	return guard.kind === 'heat-limits' ? guard : null;
}
