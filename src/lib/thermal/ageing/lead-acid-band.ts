import { requireWhole } from '../statistics/require-whole';
import { LEAD_ACID_HALVING_K, leadAcidRemaining, leadAcidWearPerYear, type LeadAcidDuty } from './lead-acid';

const LONGEST_YEARS = 10;
/** Above this the rule of halving is not meant to hold. */
const HOTTEST_C = 60;

export interface LeadAcidYear {
	years: number;
	/** Remaining shares of the first capacity. */
	remainingLow: number;
	remainingMiddle: number;
	remainingHigh: number;
	/** True once the life is used up even by the kinder custom. */
	surelyWornOut: boolean;
}

export interface LeadAcidBand {
	/** Years until 80 % of the capacity, by the two customs and between them. */
	lifeYears: { low: number; middle: number; high: number };
	years: LeadAcidYear[];
	/** Hours a year hotter than the rule is meant for: it is followed there all the same. */
	hoursBeyondRule: number;
}

/**
 * Expected life and remaining capacity of a lead-acid battery, as a band between the two customs of what halves its life.
 *
 *     low: 8.3 K halve it,  high: 10 K,  middle: mean wear of the two;   remaining = 1 − 0.2 · wear · years
 *
 * @param duty hours at each temperature, rated life in years and in Ah, charge taken out a year
 * @param years how many years ahead, a whole number within 1 to 10
 * @returns life, remaining capacity after each year, hours beyond 60 °C
 * @throws EngineInputError when the hours are not those of a year or a figure is not above zero
 * Validity: as leadAcidWearPerYear and leadAcidRemaining.
 * Source: as leadAcidLifeFactor and leadAcidRemaining.
 * @example
 * const year = [{ tempC: 35, hours: 8766 }];
 * leadAcidBand({ year, ratedLifeYears: 8, ratedLifeAh: null, takenOutAhPerYear: 0 }, 1).lifeYears.high; // 4
 */
export function leadAcidBand(duty: LeadAcidDuty, years: number): LeadAcidBand {
	requireWhole(1, LONGEST_YEARS, { years });
	const fast = leadAcidWearPerYear(duty, LEAD_ACID_HALVING_K.short);
	const slow = leadAcidWearPerYear(duty, LEAD_ACID_HALVING_K.long);
	const middle = (fast + slow) / 2;
	const hoursBeyondRule = duty.year.reduce(
		(sum, { tempC, hours }) => sum + (tempC > HOTTEST_C ? hours : 0),
		0
	);
	return {
		lifeYears: { low: 1 / fast, middle: 1 / middle, high: 1 / slow },
		years: Array.from({ length: years }, (_, k) => ({
			years: k + 1,
			remainingLow: leadAcidRemaining(fast * (k + 1)),
			remainingMiddle: leadAcidRemaining(middle * (k + 1)),
			remainingHigh: leadAcidRemaining(slow * (k + 1)),
			surelyWornOut: slow * (k + 1) >= 1
		})),
		hoursBeyondRule
	};
}
