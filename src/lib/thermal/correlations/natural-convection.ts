import { requirePositive, requireWithin } from './require';

const GRAVITY_M_PER_S2 = 9.80665;

/** Properties of the fluid at the film temperature, SI. */
export interface BuoyantFluid {
	/** β, 1/K; for an ideal gas 1/T. */
	expansionPerK: number;
	kinematicViscosityM2PerS: number;
	diffusivityM2PerS: number;
}

/**
 * Rayleigh number: how strongly warmth drives air along a surface.
 *
 *     Ra = g β ΔT L³ / (ν α)
 *
 * @param differenceK temperature difference between surface and fluid, K, above zero
 * @param lengthM height of a wall, diameter of a cylinder, or area over perimeter of a horizontal plate, m
 * @param fluid β in 1/K, ν and α in m²/s at the film temperature
 * @returns Ra, without unit
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: any fluid whose properties change little over the difference.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 9.25.
 * @example
 * rayleigh(30, 0.3, { expansionPerK: 0.0033, kinematicViscosityM2PerS: 16.2e-6, diffusivityM2PerS: 22.9e-6 }); // 7.0659e7
 */
export function rayleigh(differenceK: number, lengthM: number, fluid: BuoyantFluid): number {
	const { expansionPerK, kinematicViscosityM2PerS, diffusivityM2PerS } = fluid;
	requirePositive({ differenceK, lengthM, expansionPerK, kinematicViscosityM2PerS, diffusivityM2PerS });
	const drive = GRAVITY_M_PER_S2 * expansionPerK * differenceK * lengthM ** 3;
	return drive / (kinematicViscosityM2PerS * diffusivityM2PerS);
}

/** [1 + (a/Pr)^(9/16)], which all of Churchill's laws share. */
function prandtlTerm(a: number, pr: number): number {
	return 1 + (a / pr) ** (9 / 16);
}

/**
 * Mean Nusselt number of a vertical plate, one equation for laminar and turbulent flow.
 *
 *     Nu = { 0.825 + 0.387 Ra^(1/6) / [1 + (0.492/Pr)^(9/16)]^(8/27) }²
 *
 * @param ra Rayleigh number over the height
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over the height
 * @throws EngineInputError outside 0 < Ra ≤ 1e13 or when Pr is not above zero
 * Validity: isothermal plate, all Ra (checked to 1e13).
 * Source: Incropera et al., 6th ed., eq. 9.26 (Churchill and Chu 1975).
 * @example
 * nusseltVerticalPlate(1.8147e9, 0.69); // 147.16
 */
export function nusseltVerticalPlate(ra: number, pr: number): number {
	requirePositive({ ra, pr });
	requireWithin(0, 1e13, { ra });
	return (0.825 + (0.387 * ra ** (1 / 6)) / prandtlTerm(0.492, pr) ** (8 / 27)) ** 2;
}

/**
 * Mean Nusselt number of a vertical plate in laminar flow, a little closer there than the equation for all Ra.
 *
 *     Nu = 0.68 + 0.670 Ra^¼ / [1 + (0.492/Pr)^(9/16)]^(4/9)
 *
 * @param ra Rayleigh number over the height
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over the height
 * @throws EngineInputError outside 0 < Ra ≤ 1e9 or when Pr is not above zero
 * Validity: isothermal plate, Ra ≤ 1e9.
 * Source: Incropera et al., 6th ed., eq. 9.27 (Churchill and Chu 1975).
 * @example
 * nusseltVerticalPlateLaminar(7.068e7, 0.71); // 47.831
 */
export function nusseltVerticalPlateLaminar(ra: number, pr: number): number {
	requirePositive({ ra, pr });
	requireWithin(0, 1e9, { ra });
	return 0.68 + (0.67 * ra ** 0.25) / prandtlTerm(0.492, pr) ** (4 / 9);
}

/** Which way the heat wants to go from a horizontal plate: freely, or held under (or over) it. */
export type PlateFace = 'hot-up' | 'hot-down';

/**
 * Mean Nusselt number of a horizontal plate.
 *
 *     hot face up (or cold face down):  Nu = 0.54 Ra^¼ (Ra ≤ 1e7),  0.15 Ra^⅓ (above)
 *     hot face down (or cold face up):  Nu = 0.27 Ra^¼
 *
 * @param ra Rayleigh number over area/perimeter (in older editions half the width of a strip)
 * @param face which way the hot face looks
 * @returns mean Nu over that length
 * @throws EngineInputError outside 1e4 ≤ Ra ≤ 1e11 (up) or 1e5 ≤ Ra ≤ 1e10 (down)
 * Validity: isothermal plate with free edges; the two laws for the face up meet to 6 % at 1e7.
 * Source: Incropera et al., 6th ed., eq. 9.30 to 9.32 (McAdams 1954).
 * @example
 * nusseltHorizontalPlate(1.381e8, 'hot-up'); // 77.533
 */
export function nusseltHorizontalPlate(ra: number, face: PlateFace): number {
	if (face === 'hot-down') {
		requireWithin(1e5, 1e10, { ra });
		return 0.27 * ra ** 0.25;
	}
	requireWithin(1e4, 1e11, { ra });
	return ra <= 1e7 ? 0.54 * ra ** 0.25 : 0.15 * Math.cbrt(ra);
}

/**
 * Mean Nusselt number of a long horizontal cylinder.
 *
 *     Nu = { 0.60 + 0.387 Ra^(1/6) / [1 + (0.559/Pr)^(9/16)]^(8/27) }²
 *
 * @param ra Rayleigh number over the diameter
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over the circumference
 * @throws EngineInputError outside 0 < Ra ≤ 1e12 or when Pr is not above zero
 * Validity: isothermal cylinder, Ra ≤ 1e12.
 * Source: Incropera et al., 6th ed., eq. 9.34 (Churchill and Chu 1975).
 * @example
 * nusseltHorizontalCylinder(5.073e6, 0.697); // 23.091
 */
export function nusseltHorizontalCylinder(ra: number, pr: number): number {
	requirePositive({ ra, pr });
	requireWithin(0, 1e12, { ra });
	return (0.6 + (0.387 * ra ** (1 / 6)) / prandtlTerm(0.559, pr) ** (8 / 27)) ** 2;
}
