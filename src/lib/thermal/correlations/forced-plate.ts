import { requireNotBelow, requirePositive, requireWithin } from './require';

/** Reynolds number at which the boundary layer of a smooth flat plate turns turbulent. */
export const CRITICAL_REYNOLDS = 5e5;

/**
 * Distance from the leading edge at which the boundary layer of a smooth plate turns turbulent.
 *
 *     xc = Rec ν / u,  Rec = 5e5
 *
 * @param speedMPerS speed of the free stream u, m/s
 * @param kinematicViscosityM2PerS ν at the film temperature, m²/s
 * @returns xc, m
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: smooth plate, quiet flow; roughness and turbulence bring it forward to Re 1e5, great quiet delays it to 3e6 (from memory).
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., ch. 6, critical Reynolds number.
 * @example
 * criticalPlateLengthM(30, 16.5e-6); // 0.275
 */
export function criticalPlateLengthM(speedMPerS: number, kinematicViscosityM2PerS: number): number {
	requirePositive({ speedMPerS, kinematicViscosityM2PerS });
	return (CRITICAL_REYNOLDS * kinematicViscosityM2PerS) / speedMPerS;
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
 * Mean Nusselt number of a flat plate with a laminar boundary layer, one equation for every Prandtl number.
 *
 *     Nu = 0.6774 Re^½ Pr^⅓ / [1 + (0.0468/Pr)^⅔]^¼
 *
 * @param re Reynolds number over the length of the plate
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over that length
 * @throws EngineInputError outside 0 < Re ≤ 5e5 or when Re·Pr is below 100
 * Validity: isothermal smooth plate, Re ≤ 5e5, Re·Pr ≥ 100 (from memory); 2 % below the law for gases at Pr 0.7.
 * Source: Churchill and Ozoe, Journal of Heat Transfer 95 (1973) 416; Incropera et al., 6th ed., ch. 7.
 * @example
 * nusseltPlateLaminarAllPrandtl(1e5, 0.7); // 183.09
 */
export function nusseltPlateLaminarAllPrandtl(re: number, pr: number): number {
	requirePositive({ re, pr });
	requireWithin(0, CRITICAL_REYNOLDS, { re });
	requireNotBelow(100, { peclet: re * pr });
	return (0.6774 * Math.sqrt(re) * Math.cbrt(pr)) / (1 + (0.0468 / pr) ** (2 / 3)) ** 0.25;
}

/**
 * Mean Nusselt number of a flat plate that is turbulent from its leading edge.
 *
 *     Nu = 0.037 Re^0.8 Pr / [1 + 2.443 Re^(−0.1) (Pr^⅔ − 1)]
 *
 * @param re Reynolds number over the length of the plate
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over that length
 * @throws EngineInputError outside 1e5 ≤ Re ≤ 1e7 or 0.6 ≤ Pr ≤ 2000
 * Validity: smooth plate with a tripped boundary layer, 1e5 ≤ Re ≤ 1e7 (from 5e5 for certain), 0.6 ≤ Pr ≤ 2000 (limits from memory).
 * Source: Schlichting and Gersten, Grenzschicht-Theorie, 9th ed. 1997; VDI Heat Atlas, 2nd ed. 2010, G4.
 * @example
 * nusseltPlateTurbulent(1e5, 0.7); // 309.62
 */
export function nusseltPlateTurbulent(re: number, pr: number): number {
	requireWithin(1e5, 1e7, { re });
	requireWithin(0.6, 2000, { pr });
	return (0.037 * re ** 0.8 * pr) / (1 + 2.443 * re ** -0.1 * (pr ** (2 / 3) - 1));
}

/**
 * Mean Nusselt number of a turbulent flat plate in the form that Kreith gives.
 *
 *     Nu = 0.036 Re^0.8 Pr^⅓
 *
 * @param re Reynolds number over the length of the plate
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over that length
 * @throws EngineInputError outside 5e5 ≤ Re ≤ 1e8 or 0.5 ≤ Pr ≤ 60
 * Validity: smooth plate, turbulent boundary layer, 5e5 ≤ Re ≤ 1e8, 0.5 ≤ Pr ≤ 60 (limits from memory).
 * Source: Kreith, Manglik, Bohn, Principles of Heat Transfer, 7th ed. 2010, turbulent flow over a plane surface.
 * @example
 * nusseltPlateTurbulentKreith(1.03e6, 0.71); // 2074.9
 */
export function nusseltPlateTurbulentKreith(re: number, pr: number): number {
	requireWithin(CRITICAL_REYNOLDS, 1e8, { re });
	requireWithin(0.5, 60, { pr });
	return 0.036 * re ** 0.8 * Math.cbrt(pr);
}
