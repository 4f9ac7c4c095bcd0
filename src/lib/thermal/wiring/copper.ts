import { EngineInputError, requireNotBelow, requirePositive, requireWithin } from '../correlations/require';
import { interpolateLog } from './interpolate-log';

const REFERENCE_C = 20;
/** Ω mm²/m at 20 °C. */
const RESISTIVITY = 0.0172;
/** Per kelvin from 20 °C. */
const TEMPERATURE_COEFFICIENT = 0.00393;
/** Greatest resistance of plain flexible conductors (class 5) at 20 °C: mm², Ω/km. */
const CLASS_5: readonly (readonly [number, number])[] = [
	[1.5, 13.3],
	[2.5, 7.98],
	[4, 4.95],
	[6, 3.3],
	[10, 1.91],
	[16, 1.21],
	[25, 0.78],
	[35, 0.554],
	[50, 0.386],
	[70, 0.272],
	[95, 0.206],
	[120, 0.161]
];
const METRES_PER_KM = 1000;

/** Cross-sections that the tables cover, mm². */
export const SMALLEST_AREA_MM2 = CLASS_5[0]![0];
export const LARGEST_AREA_MM2 = CLASS_5.at(-1)![0];

/**
 * How much more copper resists when it is warm.
 *
 *     R/R₂₀ = 1 + α (T − 20),  α = 0.00393/K
 *
 * @param conductorC temperature of the conductor, °C
 * @returns resistance over that at 20 °C, without unit
 * @throws EngineInputError outside −60 to 250 °C
 * Validity: annealed copper, −60 to 250 °C.
 * Source: IEC 60287-1-1, Table 1 (α = 3.93e-3/K).
 * @example
 * copperWarmth(70); // 1.1965
 */
export function copperWarmth(conductorC: number): number {
	requireWithin(-60, 250, { conductorC });
	return 1 + TEMPERATURE_COEFFICIENT * (conductorC - REFERENCE_C);
}

/**
 * Resistance of a copper conductor from its section alone.
 *
 *     R = ρ L/A · (1 + α (T − 20)),  ρ = 0.0172 Ω mm²/m
 *
 * @param areaMm2 cross-section, mm², above zero
 * @param lengthM length of the conductor, there and back where both are copper, m
 * @param conductorC temperature of the conductor, °C
 * @returns resistance, Ω
 * @throws EngineInputError when the section is not above zero, the length below it, or the temperature outside −60 to 250 °C
 * Validity: full section of pure copper; stranded cable resists a tenth more.
 * Source: IEC 60287-1-1, Table 1 (ρ = 1.7241e-8 Ω m, rounded as in daily use).
 * @example
 * copperResistanceOhm(16, 10, 20); // 0.01075
 */
export function copperResistanceOhm(areaMm2: number, lengthM: number, conductorC: number): number {
	requirePositive({ areaMm2 });
	requireNotBelow(0, { lengthM });
	return ((RESISTIVITY * lengthM) / areaMm2) * copperWarmth(conductorC);
}

/**
 * Greatest resistance that a flexible cable may have.
 *
 *     R = r(A) L · (1 + α (T − 20))      (r: table of class 5; between sections straight in logarithms)
 *
 * @param areaMm2 cross-section, mm², 1.5 to 120
 * @param lengthM length of the conductor, there and back where both are cable, m
 * @param conductorC temperature of the conductor, °C
 * @returns resistance, Ω
 * @throws EngineInputError outside 1.5 to 120 mm², for a length below zero, or outside −60 to 250 °C
 * Validity: plain flexible copper, class 5.
 * Source: IEC 60228, Table 3 (read in pages that quote it).
 * @example
 * cableResistanceOhm(16, 10, 20); // 0.0121
 */
export function cableResistanceOhm(areaMm2: number, lengthM: number, conductorC: number): number {
	requireNotBelow(0, { lengthM });
	return ((interpolateLog(CLASS_5, { areaMm2 }) * lengthM) / METRES_PER_KM) * copperWarmth(conductorC);
}

/**
 * Factor k of copper for short circuits: how much current a square millimetre bears for a second.
 *
 *     k = 226 √ln[ 1 + (θf − θi)/(234.5 + θi) ]
 *
 * @param initialC temperature when it begins, °C
 * @param finalC temperature that the insulation bears for a moment, °C, above the first
 * @returns k, A s^½/mm²
 * @throws EngineInputError when the end is not above the beginning, or either outside −60 to 1000 °C
 * Validity: so short (5 s at most) that no heat leaves the copper.
 * Source: IEC 60364-5-54, annex A (constants of Table A.54.1).
 * @example
 * shortCircuitFactor(70, 160); // 115.00
 */
export function shortCircuitFactor(initialC: number, finalC: number): number {
	requireWithin(-60, 1000, { initialC, finalC });
	if (finalC <= initialC) throw new EngineInputError('finalC', finalC, `above ${initialC}`);
	return 226 * Math.sqrt(Math.log(1 + (finalC - initialC) / (234.5 + initialC)));
}

/**
 * How long a conductor bears a short circuit.
 *
 *     t = (k A / I)²
 *
 * @param areaMm2 cross-section, mm², above zero
 * @param factor k, A s^½/mm²
 * @param currentA short-circuit current, A, above zero
 * @returns time, s; beyond 5 s the equation is too strict
 * @throws EngineInputError when a value is not above zero
 * Validity: as shortCircuitFactor.
 * Source: IEC 60364-4-43, 434.5.2; IEC 60364-5-54, 543.1.2.
 * @example
 * shortCircuitWithstandS(16, 115, 1840); // 1
 */
export function shortCircuitWithstandS(areaMm2: number, factor: number, currentA: number): number {
	requirePositive({ areaMm2, factor, currentA });
	return ((factor * areaMm2) / currentA) ** 2;
}
