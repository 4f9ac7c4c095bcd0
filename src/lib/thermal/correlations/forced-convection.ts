import { requireNotBelow, requirePositive, requireWithin } from './require';

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
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 7.54 (Churchill and Bernstein 1977).
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

/**
 * Mean Nusselt number of a sphere in a flow, with the fluid's properties at the free stream.
 *
 *     Nu = 2 + (0.4 Re^½ + 0.06 Re^⅔) Pr^0.4 (μ/μs)^¼
 *
 * @param re Reynolds number over the diameter
 * @param pr Prandtl number of the free stream
 * @param viscosityPaS μ of the free stream, Pa·s
 * @param surfaceViscosityPaS μs at the temperature of the surface, Pa·s
 * @returns mean Nu over the sphere
 * @throws EngineInputError outside 3.5 ≤ Re ≤ 7.6e4, 0.7 ≤ Pr ≤ 380 or 0.5 ≤ μ/μs ≤ 3.2
 * Validity: 3.5 ≤ Re ≤ 7.6e4, 0.71 ≤ Pr ≤ 380, 1 ≤ μ/μs ≤ 3.2 as published; a gas that meets a hot sphere lies a little
 *   below in Pr and in μ/μs, as in the handbook's own example 7.6, and is let pass down to 0.7 and 0.5. Within about 30 % (from memory).
 * Source: Incropera et al., 6th ed., eq. 7.56 (Whitaker 1972).
 * @example
 * nusseltSphere(6439, 0.708, 182.6e-7, 197.8e-7); // 47.13
 */
export function nusseltSphere(
	re: number,
	pr: number,
	viscosityPaS: number,
	surfaceViscosityPaS: number
): number {
	requireWithin(3.5, 7.6e4, { re });
	requireWithin(0.7, 380, { pr });
	requirePositive({ viscosityPaS, surfaceViscosityPaS });
	const viscosityRatio = viscosityPaS / surfaceViscosityPaS;
	requireWithin(0.5, 3.2, { viscosityRatio });
	return 2 + (0.4 * Math.sqrt(re) + 0.06 * Math.cbrt(re) ** 2) * pr ** 0.4 * viscosityRatio ** 0.25;
}
