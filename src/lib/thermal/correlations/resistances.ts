import { requireNotBelow, requirePositive } from './require';

/**
 * Resistance of a flat layer to heat.
 *
 *     R = L/(k A)
 *
 * @param thicknessM L, m
 * @param conductivityWPerMK k, W/mK
 * @param areaM2 A, m²
 * @returns R, K/W
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: steady heat through a layer that is wide against its thickness.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 3.6.
 * @example
 * layerResistanceKPerW(0.006, 0.15, 1); // 0.04
 */
export function layerResistanceKPerW(thicknessM: number, conductivityWPerMK: number, areaM2: number): number {
	requirePositive({ thicknessM, conductivityWPerMK, areaM2 });
	return thicknessM / (conductivityWPerMK * areaM2);
}

/**
 * Resistance of the wall of a tube to heat.
 *
 *     R = ln(r2/r1)/(2 π k L)
 *
 * @param innerRadiusM r1, m
 * @param outerRadiusM r2, m
 * @param conductivityWPerMK k, W/mK
 * @param lengthM L, m
 * @returns R, K/W
 * @throws EngineInputError when a value is not above zero or r2 is below r1
 * Validity: steady heat through a long tube.
 * Source: Incropera et al., 6th ed., eq. 3.28.
 * @example
 * tubeResistanceKPerW(0.05, 0.055, 13.4, 0.8); // 0.001415
 */
export function tubeResistanceKPerW(
	innerRadiusM: number,
	outerRadiusM: number,
	conductivityWPerMK: number,
	lengthM: number
): number {
	requirePositive({ innerRadiusM, conductivityWPerMK, lengthM });
	requireNotBelow(innerRadiusM, { outerRadiusM });
	return Math.log(outerRadiusM / innerRadiusM) / (2 * Math.PI * conductivityWPerMK * lengthM);
}

/**
 * Resistance of a film, of air or of radiation.
 *
 *     R = 1/(h A)
 *
 * @param filmWPerM2K h, W/m²K
 * @param areaM2 A, m²
 * @returns R, K/W
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: any film; films side by side add as h.
 * Source: Incropera et al., 6th ed., eq. 3.9.
 * @example
 * filmResistanceKPerW(100, 1); // 0.01
 */
export function filmResistanceKPerW(filmWPerM2K: number, areaM2: number): number {
	requirePositive({ filmWPerM2K, areaM2 });
	return 1 / (filmWPerM2K * areaM2);
}

/**
 * Resistance of a joint between two surfaces pressed together.
 *
 *     R = R″/A
 *
 * @param contactM2KPerW R″ of the pair of surfaces, m²K/W
 * @param areaM2 A, m²
 * @returns R, K/W
 * @throws EngineInputError when R″ is below zero or the area not above zero
 * Validity: R″ belongs to the materials, their finish, the pressure and what fills the gap; published values spread threefold.
 * Source: Incropera et al., 6th ed., eq. 3.20.
 * @example
 * contactResistanceKPerW(0.9e-4, 1e-4); // 0.9
 */
export function contactResistanceKPerW(contactM2KPerW: number, areaM2: number): number {
	requireNotBelow(0, { contactM2KPerW });
	requirePositive({ areaM2 });
	return contactM2KPerW / areaM2;
}

/**
 * Resistances one behind the other.
 *
 *     R = Σ Ri
 *
 * @param resistancesKPerW each, K/W
 * @returns R, K/W
 * @throws EngineInputError when one is below zero or there is none
 * Validity: all the heat passes through each of them.
 * Source: Incropera et al., 6th ed., eq. 3.12.
 * @example
 * seriesResistanceKPerW([0.01, 0.04, 0.05]); // 0.1
 */
export function seriesResistanceKPerW(resistancesKPerW: readonly number[]): number {
	requirePositive({ resistances: resistancesKPerW.length });
	for (const resistanceKPerW of resistancesKPerW) requireNotBelow(0, { resistanceKPerW });
	return resistancesKPerW.reduce((sum, resistance) => sum + resistance, 0);
}

/**
 * Resistances side by side.
 *
 *     1/R = Σ 1/Ri
 *
 * @param resistancesKPerW each, K/W
 * @returns R, K/W
 * @throws EngineInputError when one is not above zero or there is none
 * Validity: all have the same two temperatures.
 * Source: Incropera et al., 6th ed., section 3.1.3.
 * @example
 * parallelResistanceKPerW([0.2, 0.2]); // 0.1
 */
export function parallelResistanceKPerW(resistancesKPerW: readonly number[]): number {
	requirePositive({ resistances: resistancesKPerW.length });
	for (const resistanceKPerW of resistancesKPerW) requirePositive({ resistanceKPerW });
	return 1 / resistancesKPerW.reduce((sum, resistance) => sum + 1 / resistance, 0);
}
