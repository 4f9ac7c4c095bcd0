import { requireNotBelow, requirePositive, requireWithin } from '../correlations/require';
import { shareYear, type HoursAtTemperature } from './histogram';

/** Standards rate life here; cooler is not credited. */
const RATED_C = 25;
/** A battery counts as worn out at this share of its capacity. */
const WORN_OUT = 0.8;

/** How many kelvin halve the life, by the two customs. */
export const LEAD_ACID_HALVING_K = { short: 25 / 3, long: 10 } as const;

/** 2^(−(T − 25)/halving), wherever the temperature lies; 1 below 25 °C. */
function shorten(tempC: number, halvingK: number): number {
	return 2 ** (-Math.max(0, tempC - RATED_C) / halvingK);
}

/**
 * What is left of the life of a lead-acid battery when it stands in the warm.
 *
 *     f = 2^(−(T − 25)/ΔT)  above 25 °C,  1 below
 *
 * @param tempC temperature of the electrolyte, °C
 * @param halvingK ΔT: how many kelvin halve the life, 8.3 (15 °F) or 10
 * @returns life over life at 25 °C, above 0 and at most 1
 * @throws EngineInputError outside −40 to 60 °C, or when the halving is not above zero
 * Validity: an experience for float service; above 60 °C other damage takes over.
 * Source: IEEE 450 and IEEE 1188 practice (15 °F), 10 K as battery makers' guides have it; rule read in secondary pages.
 * @example
 * leadAcidLifeFactor(45, 10); // 0.25
 */
export function leadAcidLifeFactor(tempC: number, halvingK: number): number {
	requireWithin(-40, 60, { tempC });
	requirePositive({ halvingK });
	return shorten(tempC, halvingK);
}

export interface LeadAcidDuty {
	year: readonly HoursAtTemperature[];
	/** Life that the maker gives at 25 °C, years. */
	ratedLifeYears: number;
	/** Charge that the maker lets it give in its life, Ah; null where standing alone wears it. */
	ratedLifeAh: number | null;
	takenOutAhPerYear: number;
}

/**
 * How much of its life a lead-acid battery uses up in a year: standing in the heat and giving charge, added up.
 *
 *     used = Σ sₖ / (L fₖ) + Ah/Ah(life)      (sₖ: share of the year at Tₖ, L: rated life)
 *
 * @param duty hours at each temperature, rated life in years and in Ah, charge taken out a year
 * @param halvingK how many kelvin halve the life
 * @returns share of the life used up in a year
 * @throws EngineInputError when the hours are not those of a year or a figure is not above zero
 * Validity: as leadAcidLifeFactor, followed beyond 60 °C; wear adds up as Miner's rule has it.
 * Source: as leadAcidLifeFactor; Miner, J. Appl. Mech. 12 (1945) A159 for adding wear.
 * @example
 * leadAcidWearPerYear({ year: [{ tempC: 35, hours: 8766 }], ratedLifeYears: 8, ratedLifeAh: null, takenOutAhPerYear: 0 }, 10); // 0.25
 */
export function leadAcidWearPerYear(duty: LeadAcidDuty, halvingK: number): number {
	const { year, ratedLifeYears, ratedLifeAh, takenOutAhPerYear } = duty;
	requirePositive({ ratedLifeYears, halvingK, ...(ratedLifeAh === null ? {} : { ratedLifeAh }) });
	requireNotBelow(0, { takenOutAhPerYear });
	const standing = shareYear(year).reduce(
		(sum, { tempC, share }) => sum + share / shorten(tempC, halvingK),
		0
	);
	return standing / ratedLifeYears + (ratedLifeAh === null ? 0 : takenOutAhPerYear / ratedLifeAh);
}

/**
 * Remaining capacity of a lead-acid battery after some of its life: a straight line to 80 % at the end.
 *
 *     remaining = 1 − 0.2 · used, not below 0
 *
 * @param used share of the life used up; beyond 1 the line is followed
 * @returns share of the first capacity, 0…1
 * @throws EngineInputError when the share is below zero
 * Validity: coarse; real batteries hold their capacity at first and then fall off.
 * Source: end of life at 80 % as in IEEE 450; the straight line is our assumption.
 * @example
 * leadAcidRemaining(0.5); // 0.9
 */
export function leadAcidRemaining(used: number): number {
	requireNotBelow(0, { used });
	return Math.max(0, 1 - (1 - WORN_OUT) * used);
}
