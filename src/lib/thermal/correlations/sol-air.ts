import { requireNotBelow, requirePositive, requireWithin } from './require';

/**
 * The air temperature that would warm a surface as sun, sky and air do together.
 *
 *     Te = Tair + α E/ho − ε ΔR/ho
 *
 * @param surface air in °C, absorptivity, irradiance in W/m², film ho in W/m²K and what the surface sends to the sky beyond
 *   what it receives, ε ΔR, in W/m² (about 68 for a level surface under a clear sky, 0 for an upright one)
 * @returns Te, °C
 * @throws EngineInputError when the absorptivity is not within 0 < α ≤ 1, the film not above zero, sun or sky loss below zero
 * Validity: an outer surface in steady state.
 * Source: ASHRAE Handbook Fundamentals, ch. 18, sol-air temperature (ho = 17 W/m²K in summer and 4 K for a level surface from memory).
 * @example
 * solAirC({ airC: 40, absorptivity: 0.9, irradianceWPerM2: 1000, filmWPerM2K: 17, skyLossWPerM2: 68 }); // 88.94
 */
export function solAirC(surface: {
	airC: number;
	absorptivity: number;
	irradianceWPerM2: number;
	filmWPerM2K: number;
	skyLossWPerM2: number;
}): number {
	const { airC, absorptivity, irradianceWPerM2, filmWPerM2K, skyLossWPerM2 } = surface;
	requireNotBelow(-100, { airC });
	requirePositive({ absorptivity, filmWPerM2K });
	requireWithin(0, 1, { absorptivity });
	requireNotBelow(0, { irradianceWPerM2, skyLossWPerM2 });
	return airC + (absorptivity * irradianceWPerM2 - skyLossWPerM2) / filmWPerM2K;
}
