import { requireNotBelow } from '../correlations/require';
import { arrheniusFactor } from './arrhenius';
import { requireTested, type TestedRange } from './tested-range';

const REFERENCE_C = 25;
const CAPACITY = { perRootS: 1.2571e-5, activationJPerMol: 17126, cubic: 2.8575, constant: 0.60225 };
const RESISTANCE = { perS: 3.4194e-10, activationJPerMol: 71827, cubic: -3.3903, constant: 1.5604 };

/** Storage tests lasted 885 days. */
export const NAUMANN_CALENDAR_TESTED: TestedRange = { tempC: [0, 60], soc: [0, 1], years: 885 / 365.25 };

function shape({ cubic, constant }: { cubic: number; constant: number }, soc: number): number {
	return cubic * (soc - 0.5) ** 3 + constant;
}

/** Share of the capacity lost per root second, wherever the temperature lies. */
export function naumannCalendarRate(tempC: number, soc: number): number {
	const { perRootS, activationJPerMol } = CAPACITY;
	return perRootS * arrheniusFactor(activationJPerMol, tempC, REFERENCE_C) * shape(CAPACITY, soc);
}

/** Share by which the resistance grows per second, wherever the temperature lies. */
export function naumannResistanceRate(tempC: number, soc: number): number {
	const { perS, activationJPerMol } = RESISTANCE;
	return perS * arrheniusFactor(activationJPerMol, tempC, REFERENCE_C) * shape(RESISTANCE, soc);
}

/**
 * Capacity that lithium iron phosphate cells lose by standing.
 *
 *     loss = 1.2571e-5 exp[ −17126/R (1/T − 1/298.15) ] (2.8575 (SOC − 0.5)³ + 0.60225) √t      (T in kelvin, t in s)
 *
 * @param tempC cell temperature, °C
 * @param soc state of charge, 0…1
 * @param seconds time, s
 * @returns lost share of the capacity, 0…1
 * @throws EngineInputError outside 0 to 60 °C, outside 0 to 1 of charge, or when the time is below zero
 * Validity: graphite/LiFePO4 26650 cells of 3 Ah, 0 to 60 °C, stored up to 885 days (from memory); longer is extrapolated.
 * Source: Naumann, Schimpe, Keil, Hesse, Jossen, J. Energy Storage 17 (2018) 153–169 (numbers read in a public implementation).
 * @example
 * naumannCalendarLoss(45, 0.5, 31557600); // 0.06566
 */
export function naumannCalendarLoss(tempC: number, soc: number, seconds: number): number {
	requireTested(NAUMANN_CALENDAR_TESTED, { tempC, soc });
	requireNotBelow(0, { seconds });
	return naumannCalendarRate(tempC, soc) * Math.sqrt(seconds);
}

/**
 * Resistance that lithium iron phosphate cells gain by standing.
 *
 *     gain = 3.4194e-10 exp[ −71827/R (1/T − 1/298.15) ] (−3.3903 (SOC − 0.5)³ + 1.5604) t      (T in kelvin, t in s)
 *
 * @param tempC cell temperature, °C
 * @param soc state of charge, 0…1
 * @param seconds time, s
 * @returns gain as a share of the first resistance
 * @throws EngineInputError outside 0 to 60 °C, outside 0 to 1 of charge, or when the time is below zero
 * Validity: as naumannCalendarLoss. The cube of the state of charge is as a public implementation has it; the paper may
 * print a square (from memory). At half charge both are the same.
 * Source: Naumann, Schimpe, Keil, Hesse, Jossen, J. Energy Storage 17 (2018) 153–169.
 * @example
 * naumannResistanceGain(45, 0.5, 31557600); // 0.10407
 */
export function naumannResistanceGain(tempC: number, soc: number, seconds: number): number {
	requireTested(NAUMANN_CALENDAR_TESTED, { tempC, soc });
	requireNotBelow(0, { seconds });
	return naumannResistanceRate(tempC, soc) * seconds;
}
