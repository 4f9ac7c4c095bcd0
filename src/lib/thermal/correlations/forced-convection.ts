import { requireNotBelow, requirePositive, requireWithin } from './require';

/** Reynolds number at which the boundary layer of a smooth flat plate turns turbulent. */
export const CRITICAL_REYNOLDS = 5e5;

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

/**
 * Mean Nusselt number of a flat plate with a laminar boundary layer.
 *
 *     Nu = 0.664 Re^½ Pr^⅓
 *
 * @param re Reynolds number over the length of the plate
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over that length
 * @throws EngineInputError outside 0 < Re ≤ 5e5 or 0.6 ≤ Pr ≤ 50
 * Validity: smooth plate at one temperature, parallel flow, Re ≤ 5e5, 0.6 ≤ Pr ≤ 50.
 * Source: Incropera et al., 6th ed., eq. 7.30.
 * @example
 * nusseltPlateLaminar(9600, 0.687); // 57.41
 */
export function nusseltPlateLaminar(re: number, pr: number): number {
	requirePositive({ re });
	requireWithin(0, CRITICAL_REYNOLDS, { re });
	requireWithin(0.6, 50, { pr });
	return 0.664 * Math.sqrt(re) * Math.cbrt(pr);
}

/**
 * Mean Nusselt number of a flat plate whose boundary layer turns turbulent at Re = 5e5.
 *
 *     Nu = (0.037 Re^⅘ − 871) Pr^⅓
 *
 * @param re Reynolds number over the length of the plate
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over that length
 * @throws EngineInputError outside 5e5 ≤ Re ≤ 1e8 or 0.6 ≤ Pr ≤ 60
 * Validity: smooth plate at one temperature, 5e5 ≤ Re ≤ 1e8, 0.6 ≤ Pr ≤ 60; joins the laminar law at 5e5 to 0.1 %.
 * Source: Incropera et al., 6th ed., eq. 7.38.
 * @example
 * nusseltPlateMixed(681560, 0.69); // 748.39
 */
export function nusseltPlateMixed(re: number, pr: number): number {
	requireWithin(CRITICAL_REYNOLDS, 1e8, { re });
	requireWithin(0.6, 60, { pr });
	return (0.037 * re ** 0.8 - 871) * Math.cbrt(pr);
}

/**
 * Mean Nusselt number of a cylinder across a flow, one equation for all speeds.
 *
 *     Nu = 0.3 + 0.62 Re^½ Pr^⅓ / [1 + (0.4/Pr)^⅔]^¼ · [1 + (Re/282000)^⅝]^⅘
 *
 * @param re Reynolds number over the diameter
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over the circumference
 * @throws EngineInputError when a value is not above zero or Re·Pr is below 0.2
 * Validity: Re·Pr ≥ 0.2; within about 20 % of measurements.
 * Source: Incropera et al., 6th ed., eq. 7.54 (Churchill and Bernstein 1977).
 * @example
 * nusseltCylinderAllSpeeds(6071, 0.7); // 40.637
 */
export function nusseltCylinderAllSpeeds(re: number, pr: number): number {
	requirePositive({ re, pr });
	requireNotBelow(0.2, { peclet: re * pr });
	const prandtlPart = (1 + (0.4 / pr) ** (2 / 3)) ** 0.25;
	return 0.3 + ((0.62 * Math.sqrt(re) * Math.cbrt(pr)) / prandtlPart) * (1 + (re / 282_000) ** 0.625) ** 0.8;
}

/** Constants of Zukauskas' law up to each Reynolds number. */
const ZUKAUSKAS_BANDS = [
	{ upTo: 40, c: 0.75, m: 0.4 },
	{ upTo: 1e3, c: 0.51, m: 0.5 },
	{ upTo: 2e5, c: 0.26, m: 0.6 },
	{ upTo: 1e6, c: 0.076, m: 0.7 }
] as const;

/**
 * Mean Nusselt number of a cylinder across a flow, with the fluid's properties at the free stream.
 *
 *     Nu = C Re^m Pr^n (Pr/Prs)^¼,  n = 0.37 (Pr ≤ 10) or 0.36
 *
 * @param re Reynolds number over the diameter
 * @param pr Prandtl number of the free stream
 * @param prSurface Prandtl number at the temperature of the surface
 * @returns mean Nu over the circumference
 * @throws EngineInputError outside 1 ≤ Re ≤ 1e6, or a Prandtl number outside 0.6 to 500
 * Validity: 1 ≤ Re ≤ 1e6, 0.7 ≤ Pr ≤ 500 (hot air, a little below 0.7, is let pass); within about 20 % of measurements.
 * Source: Incropera et al., 6th ed., eq. 7.53 and Table 7.4 (Zukauskas 1972).
 * @example
 * nusseltCylinderBanded(7992, 0.707, 0.69); // 50.524
 */
export function nusseltCylinderBanded(re: number, pr: number, prSurface: number): number {
	requireWithin(1, 1e6, { re });
	requireWithin(0.6, 500, { pr, prSurface });
	const band = ZUKAUSKAS_BANDS.find(({ upTo }) => re <= upTo)!;
	const n = pr <= 10 ? 0.37 : 0.36;
	return band.c * re ** band.m * pr ** n * (pr / prSurface) ** 0.25;
}
