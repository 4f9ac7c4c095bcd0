import { requirePositive, requireWithin } from './require';

/** Over which length of a horizontal plate Ra and Nu are taken. */
export type PlateLengthRule = 'area-over-perimeter' | 'half-width';

/**
 * The length of a horizontal plate that its Rayleigh and Nusselt numbers go by.
 *
 *     area over perimeter:  L = a b / (2 (a + b))        (newer handbooks)
 *     half width:           L = min(a, b) / 2            (long strips in older editions)
 *
 * @param widthM side a, m
 * @param depthM side b, m
 * @param rule which of the two; a law is used with the length that its source gives
 * @returns L, m
 * @throws EngineInputError when a side is not finite and above zero
 * Validity: rectangles; for a long strip the two rules differ by nothing, for a square by half.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., section 9.6.2 (eq. 9.29) and ex. 9.3.
 * @example
 * horizontalPlateLengthM(0.75, 1.5, 'area-over-perimeter'); // 0.25
 */
export function horizontalPlateLengthM(widthM: number, depthM: number, rule: PlateLengthRule): number {
	requirePositive({ widthM, depthM });
	return rule === 'half-width' ? Math.min(widthM, depthM) / 2 : (widthM * depthM) / (2 * (widthM + depthM));
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

/** Meets two laws smoothly: the larger one wins, and where they are equal the sum lies a little above both. */
function blend(one: number, other: number, sharpness: number): number {
	return (one ** sharpness + other ** sharpness) ** (1 / sharpness);
}

/** What a thin-layer solution becomes with the thickness of the layer taken into account. */
function thickenLayer(nusseltThin: number, constant: number): number {
	return constant / Math.log1p(constant / nusseltThin);
}

/**
 * Mean Nusselt number of a horizontal plate in any fluid, laminar to turbulent in one.
 *
 *     hot face up:    Nu = (Nul^10 + Nut^10)^(1/10),  Nul = 1.4/ln(1 + 1.4/NuT),  NuT = 0.835 Cl Ra^¼,
 *                     Cl = 0.671/[1 + (0.492/Pr)^(9/16)]^(4/9),  Nut = 0.14 (1 + 0.01707 Pr)/(1 + 0.01 Pr) Ra^⅓
 *     hot face down:  Nu = 2.5/ln(1 + 2.5/NuT),  NuT = 0.527 Ra^0.2 / [1 + (1.9/Pr)^0.9]^(2/9)
 *
 * @param ra Rayleigh number over area/perimeter
 * @param pr Prandtl number at the film temperature
 * @param face which way the hot face looks
 * @returns mean Nu over that length
 * @throws EngineInputError outside 1 ≤ Ra ≤ 1e11 (up), 1e3 ≤ Ra ≤ 1e10 (down) or when Pr is not above zero
 * Validity: isothermal plate with free edges; the limits of Ra are those of the measurements, from memory.
 * Source: Rohsenow, Hartnett, Cho, Handbook of Heat Transfer, 3rd ed. 1998, ch. 4 (Raithby and Hollands).
 * @example
 * nusseltHorizontalPlateAllFluids(1e6, 0.7, 'hot-down'); // 7.521
 */
export function nusseltHorizontalPlateAllFluids(ra: number, pr: number, face: PlateFace): number {
	requirePositive({ pr });
	if (face === 'hot-down') {
		requireWithin(1e3, 1e10, { ra });
		return thickenLayer((0.527 * ra ** 0.2) / (1 + (1.9 / pr) ** 0.9) ** (2 / 9), 2.5);
	}
	requireWithin(1, 1e11, { ra });
	const laminarShare = 0.671 / (1 + (0.492 / pr) ** (9 / 16)) ** (4 / 9);
	const laminar = thickenLayer(0.835 * laminarShare * ra ** 0.25, 1.4);
	const turbulent = ((0.14 * (1 + 0.01707 * pr)) / (1 + 0.01 * pr)) * Math.cbrt(ra);
	return blend(laminar, turbulent, 10);
}
