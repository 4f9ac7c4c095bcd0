import { requireNotBelow } from '../correlations/require';
import { requireTested, type TestedRange } from './tested-range';

/** Exponent of the months, by which changing temperatures are put together. */
export const SWIERCZYNSKI_EXPONENT = 0.8;

/** Tested at 40 to 55 °C; the authors carry the law down to 25 °C themselves. */
export const SWIERCZYNSKI_TESTED: TestedRange = { tempC: [25, 55], soc: [0.1, 0.9], years: 2 };

/** Share of the capacity lost per month to the power 0.8, wherever the temperature lies; below 0 °C as at 0 °C. */
export function swierczynskiRate(tempC: number, soc: number): number {
	const charge = 0.019 * (100 * soc) ** 0.823 + 0.5195;
	const heat = 3.258e-9 * Math.max(0, tempC) ** 5.087 + 0.295;
	return (charge * heat) / 100;
}

/**
 * Capacity that lithium iron phosphate cells lose by standing, after tests in the heat: steeper there than Naumann's.
 *
 *     loss = (0.019 SOC%^0.823 + 0.5195) (3.258e-9 T^5.087 + 0.295) months^0.8 / 100      (T in °C)
 *
 * @param tempC cell temperature, °C
 * @param soc state of charge, 0…1
 * @param months time, months of a twelfth of a year
 * @returns lost share of the capacity, 0…1
 * @throws EngineInputError outside 25 to 55 °C or 0.1 to 0.9 of charge, or when the time is below zero
 * Validity: graphite/LiFePO4 cells of 2.5 Ah, tested at 40 to 55 °C and 10 to 90 % (ranges from memory).
 * Source: Swierczynski, Stroe, Stan, Teodorescu, Kær, IEEE Trans. Ind. Appl. 51 (2015) 3453.
 * @example
 * swierczynskiCalendarLoss(40, 0.5, 12); // 0.05482
 */
export function swierczynskiCalendarLoss(tempC: number, soc: number, months: number): number {
	requireTested(SWIERCZYNSKI_TESTED, { tempC, soc });
	requireNotBelow(0, { months });
	return swierczynskiRate(tempC, soc) * months ** SWIERCZYNSKI_EXPONENT;
}
