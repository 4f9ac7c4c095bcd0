import { KELVIN_AT_ZERO_C } from '../correlations/radiation';
import { requireNotBelow, requirePositive } from '../correlations/require';
import { shareYear, type HoursAtTemperature } from './histogram';

/** Molar gas constant, J/mol K (CODATA 2018: exact, 8.31446261815324). */
export const GAS_CONSTANT = 8.31446261815324;

const COLDEST_C = -100;

/**
 * How much faster a thermally driven change runs at one temperature than at another.
 *
 *     f = exp[ −Ea/R (1/T − 1/Tref) ]      (temperatures in kelvin)
 *
 * @param activationJPerMol activation energy Ea, J/mol, above zero
 * @param tempC temperature, °C
 * @param referenceC temperature of the known rate, °C
 * @returns rate over rate at the reference, without unit
 * @throws EngineInputError when the energy is not above zero or a temperature below −100 °C
 * Validity: one process, whose energy does not change over the range.
 * Source: Arrhenius, Z. Phys. Chem. 4 (1889) 226 (the exponential law; the constant from CODATA 2018).
 * @example
 * arrheniusFactor(31700, 60, 25); // 3.832
 */
export function arrheniusFactor(activationJPerMol: number, tempC: number, referenceC: number): number {
	requirePositive({ activationJPerMol });
	requireNotBelow(COLDEST_C, { tempC, referenceC });
	const difference = 1 / (tempC + KELVIN_AT_ZERO_C) - 1 / (referenceC + KELVIN_AT_ZERO_C);
	return Math.exp((-activationJPerMol / GAS_CONSTANT) * difference);
}

/**
 * The steady temperature that ages as much as a changing one: hot hours count for more than cold ones.
 *
 *     1/Tm = −R/Ea · ln[ Σ sₖ exp(−Ea/(R Tₖ)) ]      (sₖ: share of the year at Tₖ, kelvin)
 *
 * @param year hours at each temperature, adding up to a year
 * @param activationJPerMol activation energy Ea, J/mol, above zero
 * @returns mean temperature, °C, never below the arithmetic mean of a like year in 1/T
 * @throws EngineInputError when the hours are not those of a year, or the energy is not above zero
 * Validity: one process whose rate follows Arrhenius.
 * Source: mean kinetic temperature, as in USP general chapter 1079 and ICH Q1A (from memory).
 * @example
 * meanAgeingTempC([{ tempC: 20, hours: 4383 }, { tempC: 60, hours: 4383 }], 31700); // 45.98
 */
export function meanAgeingTempC(year: readonly HoursAtTemperature[], activationJPerMol: number): number {
	const shares = shareYear(year);
	const coldest = Math.min(...shares.map(({ tempC }) => tempC));
	const mean = shares.reduce(
		(sum, { tempC, share }) => sum + share * arrheniusFactor(activationJPerMol, tempC, coldest),
		0
	);
	const inverse = 1 / (coldest + KELVIN_AT_ZERO_C) - (GAS_CONSTANT / activationJPerMol) * Math.log(mean);
	return 1 / inverse - KELVIN_AT_ZERO_C;
}
