import { requirePositive, requireWithin } from './require';

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
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 9.26 (Churchill and Chu 1975).
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

/** Constants of Morgan's law up to each Rayleigh number. */
const MORGAN_BANDS = [
	{ upTo: 1e-2, c: 0.675, n: 0.058 },
	{ upTo: 1e2, c: 1.02, n: 0.148 },
	{ upTo: 1e4, c: 0.85, n: 0.188 },
	{ upTo: 1e7, c: 0.48, n: 0.25 },
	{ upTo: 1e12, c: 0.125, n: 0.333 }
] as const;

/**
 * Mean Nusselt number of a long horizontal cylinder in bands of Ra, from a large review of measurements.
 *
 *     Nu = C Ra^n
 *
 * @param ra Rayleigh number over the diameter
 * @returns mean Nu over the circumference
 * @throws EngineInputError outside 1e-10 ≤ Ra ≤ 1e12
 * Validity: isothermal cylinder in a gas or an ordinary liquid, 1e-10 ≤ Ra ≤ 1e12; the bands meet to about 1 %.
 * Source: Incropera et al., 6th ed., eq. 9.33 and Table 9.1 (Morgan 1975).
 * @example
 * nusseltHorizontalCylinderBanded(9e6); // 26.291
 */
export function nusseltHorizontalCylinderBanded(ra: number): number {
	requireWithin(1e-10, 1e12, { ra });
	const band = MORGAN_BANDS.find(({ upTo }) => ra <= upTo)!;
	return band.c * ra ** band.n;
}

/**
 * Mean Nusselt number of a sphere in still fluid.
 *
 *     Nu = 2 + 0.589 Ra^¼ / [1 + (0.469/Pr)^(9/16)]^(4/9) · { 1 + 7.44e-8 Ra / [1 + (0.469/Pr)^(9/16)]^(16/9) }^(1/12)
 *
 * @param ra Rayleigh number over the diameter
 * @param pr Prandtl number at the film temperature
 * @returns mean Nu over the sphere
 * @throws EngineInputError outside 0 < Ra ≤ 1e13 or when Pr is not above zero
 * Validity: isothermal sphere, Ra ≤ 1e13; tends to 2, conduction into still fluid.
 * Source: Churchill, in Heat Exchanger Design Handbook, Hemisphere 1987, section 2.5.7 (section from memory).
 * @example
 * nusseltNaturalSphere(7e6, 0.7); // 25.671
 */
export function nusseltNaturalSphere(ra: number, pr: number): number {
	requirePositive({ ra, pr });
	requireWithin(0, 1e13, { ra });
	const term = prandtlTerm(0.469, pr);
	const laminar = (0.589 * ra ** 0.25) / term ** (4 / 9);
	return 2 + laminar * (1 + (7.44e-8 * ra) / term ** (16 / 9)) ** (1 / 12);
}
