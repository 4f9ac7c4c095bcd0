import { requirePositive } from './require';

const GRAVITY_M_PER_S2 = 9.80665;

/**
 * Reynolds number of a flow.
 *
 *     Re = u L / ν
 *
 * @param speedMPerS speed u, m/s
 * @param lengthM length of the plate or diameter of the cylinder L, m
 * @param kinematicViscosityM2PerS ν at the film temperature, m²/s
 * @returns Re, without unit
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: any Newtonian fluid.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 6.41.
 * @example
 * reynolds(10, 0.0127, 15.89e-6); // 7992
 */
export function reynolds(speedMPerS: number, lengthM: number, kinematicViscosityM2PerS: number): number {
	requirePositive({ speedMPerS, lengthM, kinematicViscosityM2PerS });
	return (speedMPerS * lengthM) / kinematicViscosityM2PerS;
}

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

/**
 * Film coefficient that a Nusselt number stands for.
 *
 *     h = Nu k / L
 *
 * @param nusselt Nu over the length L
 * @param conductivityWPerMK of the fluid at the temperature that the law for Nu asks for, W/mK
 * @param lengthM the length that Nu was taken over, m
 * @returns h, W/m²K
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: any fluid.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., ch. 6, definition of Nu.
 * @example
 * filmCoefficientWPerM2K(50.525, 0.0263, 0.0127); // 104.63
 */
export function filmCoefficientWPerM2K(nusselt: number, conductivityWPerMK: number, lengthM: number): number {
	requirePositive({ nusselt, conductivityWPerMK, lengthM });
	return (nusselt * conductivityWPerMK) / lengthM;
}
