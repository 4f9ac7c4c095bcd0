import { KELVIN_AT_ZERO_C } from './radiation';
import { requirePositive, requireWithin } from './require';

/** What convection needs to know of the air. */
export interface AirProperties {
	densityKgPerM3: number;
	specificHeatJPerKgK: number;
	dynamicViscosityPaS: number;
	kinematicViscosityM2PerS: number;
	conductivityWPerMK: number;
	diffusivityM2PerS: number;
	prandtl: number;
}

/** Gas constant of dry air and its specific heat as the whole engine uses them, J/kgK. */
const GAS_CONSTANT_J_PER_KG_K = 287.05;
const SPECIFIC_HEAT_J_PER_KG_K = 1006;

/** Sea level of the standard atmosphere, and how it cools upwards below 11 km. */
const SEA_LEVEL = { pressurePa: 101_325, tempK: 288.15, lapseKPerM: 0.0065, gPerR: 9.80665 / 287.05287 };

/**
 * Properties of dry air as an ideal gas.
 *
 *     ρ = p/(287.05 T),  μ = 1.458e-6 T^1.5/(T + 110.4),  k = 2.648151e-3 T^1.5/(T + 245.4·10^(−12/T))
 *     ν = μ/ρ,  α = k/(ρ cp),  Pr = ν/α,  cp = 1006 J/kgK
 *
 * @param tempC air temperature, °C
 * @param pressurePa absolute pressure, Pa
 * @returns the properties, SI
 * @throws EngineInputError outside −100…300 °C, or for a pressure not above zero
 * Validity: −100…300 °C, near 1 atm or below; from 20 to 177 °C density within 0.1 %, viscosity within 1 % and conductivity
 *   within 0.5 % of Incropera's Table A.4 (2.7 % of Cengel's A-15); cp is held constant, 1.5 % low at 177 °C.
 * Source: ISO 2533:1975, Standard Atmosphere, clause 2 (viscosity and conductivity formulas, from memory; checked against two handbooks' tables).
 * @example
 * airProperties(26.85, 101325).kinematicViscosityM2PerS; // 1.5689e-5
 */
export function airProperties(tempC: number, pressurePa: number): AirProperties {
	requireWithin(-100, 300, { tempC });
	requirePositive({ pressurePa });
	const kelvin = tempC + KELVIN_AT_ZERO_C;
	const densityKgPerM3 = pressurePa / (GAS_CONSTANT_J_PER_KG_K * kelvin);
	const dynamicViscosityPaS = (1.458e-6 * kelvin ** 1.5) / (kelvin + 110.4);
	const conductivityWPerMK = (2.648151e-3 * kelvin ** 1.5) / (kelvin + 245.4 * 10 ** (-12 / kelvin));
	const kinematicViscosityM2PerS = dynamicViscosityPaS / densityKgPerM3;
	const diffusivityM2PerS = conductivityWPerMK / (densityKgPerM3 * SPECIFIC_HEAT_J_PER_KG_K);
	return {
		densityKgPerM3,
		specificHeatJPerKgK: SPECIFIC_HEAT_J_PER_KG_K,
		dynamicViscosityPaS,
		kinematicViscosityM2PerS,
		conductivityWPerMK,
		diffusivityM2PerS,
		prandtl: kinematicViscosityM2PerS / diffusivityM2PerS
	};
}

/**
 * Air pressure at an altitude in the standard atmosphere.
 *
 *     p = 101325 (1 − 0.0065 h/288.15)^(g/(0.0065 R)),  R = 287.05287 J/kgK
 *
 * @param altitudeM geopotential altitude above sea level, m
 * @returns pressure, Pa
 * @throws EngineInputError outside −500…11000 m
 * Validity: −500…11000 m (the layer that cools evenly upwards).
 * Source: ISO 2533:1975 (ICAO standard atmosphere), clause 2.
 * @example
 * pressureAtAltitude(1000); // 89875
 */
export function pressureAtAltitude(altitudeM: number): number {
	requireWithin(-500, 11_000, { altitudeM });
	const { pressurePa, tempK, lapseKPerM, gPerR } = SEA_LEVEL;
	return pressurePa * (1 - (lapseKPerM * altitudeM) / tempK) ** (gPerR / lapseKPerM);
}
