import { requireFraction, requireNotBelow } from './require';

/** Stefan–Boltzmann constant, W/m²K⁴ (CODATA 2018: exact, from h, k and c). */
export const STEFAN_BOLTZMANN = 5.670374419e-8;

/** 0 °C in kelvin. */
export const KELVIN_AT_ZERO_C = 273.15;

/**
 * How freely two grey parallel surfaces with shields between them exchange radiation, against black ones.
 *
 *     E = 1 / [ 1/ε1 + 1/ε2 − 1 + Σ (1/εa + 1/εb − 1) ]      (one term of the sum for each shield)
 *
 * @param emissivity1 of surface 1, 0 < ε ≤ 1
 * @param emissivity2 of surface 2
 * @param shields for each shield, the emissivities of its two faces
 * @returns E, 0…1: the heat flux is E σ (T1⁴ − T2⁴)
 * @throws EngineInputError when an emissivity is not within 0 < ε ≤ 1
 * Validity: grey diffuse surfaces so near that nothing escapes at the edges; shields that neither conduct nor meet air.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 13.24 and 13.28.
 * @example
 * exchangeFactorParallel(0.8, 0.8, [[0.1, 0.1]]); // 0.048780
 */
export function exchangeFactorParallel(
	emissivity1: number,
	emissivity2: number,
	shields: readonly (readonly [number, number])[] = []
): number {
	requireFraction({ emissivity1, emissivity2 });
	let resistance = 1 / emissivity1 + 1 / emissivity2 - 1;
	for (const [front, back] of shields) {
		requireFraction({ shieldFront: front, shieldBack: back });
		resistance += 1 / front + 1 / back - 1;
	}
	return 1 / resistance;
}

/**
 * Net radiation between two surfaces joined by a radiative conductance.
 *
 *     q = G σ (T1⁴ − T2⁴)      (temperatures in kelvin)
 *
 * @param exchangeAreaM2 G, m² (1 gives the flux in W/m²)
 * @param temp1C temperature of surface 1, °C
 * @param temp2C temperature of surface 2, °C
 * @returns heat from 1 to 2, W
 * @throws EngineInputError when a temperature is below absolute zero or the area below zero
 * Validity: grey surfaces; G as given by the geometry.
 * Source: Incropera et al., 6th ed., eq. 13.19.
 * @example
 * radiateBetween(0.85, 126.85, 31.85); // 816.78
 */
export function radiateBetween(exchangeAreaM2: number, temp1C: number, temp2C: number): number {
	requireNotBelow(0, { exchangeAreaM2 });
	requireNotBelow(-KELVIN_AT_ZERO_C, { temp1C, temp2C });
	const kelvin1 = temp1C + KELVIN_AT_ZERO_C;
	const kelvin2 = temp2C + KELVIN_AT_ZERO_C;
	return STEFAN_BOLTZMANN * exchangeAreaM2 * (kelvin1 ** 4 - kelvin2 ** 4);
}

/**
 * The conductance that carries exactly the radiation between two temperatures (the secant of the fourth-power law).
 *
 *     g = G σ (T1² + T2²)(T1 + T2),  so that  q = g (T1 − T2)
 *
 * @param exchangeAreaM2 G, m² (an emissivity gives h_rad in W/m²K)
 * @param temp1C temperature of surface 1, °C
 * @param temp2C temperature of surface 2, °C
 * @returns conductance, W/K
 * @throws EngineInputError when a temperature is below absolute zero or the area below zero
 * Validity: exact at the two temperatures, an approximation away from them.
 * Source: Incropera et al., 6th ed., eq. 1.9.
 * @example
 * radiativeConductance(0.9, 26.85, 76.85); // 7.0490
 */
export function radiativeConductance(exchangeAreaM2: number, temp1C: number, temp2C: number): number {
	requireNotBelow(0, { exchangeAreaM2 });
	requireNotBelow(-KELVIN_AT_ZERO_C, { temp1C, temp2C });
	const kelvin1 = temp1C + KELVIN_AT_ZERO_C;
	const kelvin2 = temp2C + KELVIN_AT_ZERO_C;
	return STEFAN_BOLTZMANN * exchangeAreaM2 * (kelvin1 ** 2 + kelvin2 ** 2) * (kelvin1 + kelvin2);
}
