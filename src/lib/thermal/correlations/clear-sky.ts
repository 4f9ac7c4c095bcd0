import { cosDeg, sinDeg } from './angles';
import { EngineInputError, requirePositive, requireWithin } from './require';

/**
 * Sun outside the air, on a plane that faces it.
 *
 *     E0 = 1367 { 1 + 0.033 cos[360° (n − 3)/365] }
 *
 * @param dayOfYear n, 1 on the first of January
 * @returns irradiance, W/m²
 * @throws EngineInputError outside 1…366
 * Validity: any year; today's solar constant of 1361 W/m² is 0.4 % lower.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14, eq. 4.
 * @example
 * extraterrestrialWPerM2(21); // 1410
 */
export function extraterrestrialWPerM2(dayOfYear: number): number {
	requireWithin(1, 366, { dayOfYear });
	return 1367 * (1 + 0.033 * cosDeg((360 * (dayOfYear - 3)) / 365));
}

/**
 * How much more air the sun shines through than from the zenith.
 *
 *     m = 1 / [ sin h + 0.50572 (6.07995 + h)^(−1.6364) ]      (h in °)
 *
 * @param elevationDeg h, with refraction, °
 * @returns relative air mass, 1 at the zenith
 * @throws EngineInputError outside 0…90°
 * Validity: 0…90°, 38 at the horizon; for a place at altitude times p/101325.
 * Source: Kasten and Young, Applied Optics 28 (1989) 4735.
 * @example
 * relativeAirMass(60); // 1.154
 */
export function relativeAirMass(elevationDeg: number): number {
	requireWithin(0, 90, { elevationDeg });
	return 1 / (sinDeg(elevationDeg) + 0.50572 * (6.07995 + elevationDeg) ** -1.6364);
}

/** A and B of the old clear sky, January to December. */
const OLD_CLEAR_SKY = {
	aWPerM2: [1202, 1187, 1164, 1130, 1106, 1092, 1093, 1107, 1136, 1166, 1190, 1204],
	b: [0.141, 0.142, 0.149, 0.164, 0.177, 0.185, 0.186, 0.182, 0.165, 0.152, 0.144, 0.141]
} as const;

/**
 * Direct sun under a clear sky by the older method, on a plane that faces it.
 *
 *     E = A exp(−B / sin h)      (A, B of the month)
 *
 * @param month 1…12
 * @param elevationDeg h, °
 * @returns irradiance, W/m²
 * @throws EngineInputError for no whole month of 1…12, or outside 0 < h ≤ 90°
 * Validity: average cloudless days of the northern hemisphere at moderate altitude; the months are not those of the south.
 * Source: ASHRAE Handbook Fundamentals, editions to 2005, clear sky, table of A and B.
 * @example
 * oldClearSkyBeamWPerM2(1, 75); // 1038.7
 */
export function oldClearSkyBeamWPerM2(month: number, elevationDeg: number): number {
	requireMonth(month);
	requirePositive({ elevationDeg });
	requireWithin(0, 90, { elevationDeg });
	return OLD_CLEAR_SKY.aWPerM2[month - 1]! * Math.exp(-OLD_CLEAR_SKY.b[month - 1]! / sinDeg(elevationDeg));
}

function requireMonth(month: number): void {
	requireWithin(1, 12, { month });
	if (!Number.isInteger(month)) throw new EngineInputError('month', month, 'a whole number');
}

/** What the fitted form of the older clear sky comes to. */
export interface FittedClearSky {
	apparentWPerM2: number;
	opticalDepth: number;
	beamWPerM2: number;
}

/**
 * Direct sun under a clear sky by the older method, with curves through its monthly values.
 *
 *     A = 1160 + 75 sin[360° (n − 275)/365],   k = 0.174 + 0.035 sin[360° (n − 100)/365],   E = A exp(−k / sin h)
 *
 * @param dayOfYear n, 1 on the first of January
 * @param elevationDeg h, °
 * @returns A in W/m², k and the irradiance on a plane that faces the sun in W/m²
 * @throws EngineInputError outside 1…366 or 0 < h ≤ 90°
 * Validity: as the monthly values: average cloudless days of the northern hemisphere.
 * Source: Masters, Renewable and Efficient Electric Power Systems, 2004, eq. 7.21 to 7.23 (numbers from memory).
 * @example
 * fittedClearSky(141, 76.4).beamWPerM2; // 902
 */
export function fittedClearSky(dayOfYear: number, elevationDeg: number): FittedClearSky {
	requireWithin(1, 366, { dayOfYear });
	requirePositive({ elevationDeg });
	requireWithin(0, 90, { elevationDeg });
	const apparentWPerM2 = 1160 + 75 * sinDeg((360 * (dayOfYear - 275)) / 365);
	const opticalDepth = 0.174 + 0.035 * sinDeg((360 * (dayOfYear - 100)) / 365);
	return {
		apparentWPerM2,
		opticalDepth,
		beamWPerM2: apparentWPerM2 * Math.exp(-opticalDepth / sinDeg(elevationDeg))
	};
}

/** Optical depths of a place and month belong to the edition whose exponents they were fitted with. */
export type TauEdition = 2009 | 2013;

/** Constant, τb, τd and τb τd in the exponents of the air mass. */
const TAU_EXPONENTS = {
	2009: { beam: [1.219, -0.043, -0.151, -0.204], diffuse: [0.202, 0.852, -0.007, -0.357] },
	2013: { beam: [1.454, -0.406, -0.268, 0.021], diffuse: [0.507, 0.205, -0.08, -0.19] }
} as const;

export interface TauSky {
	extraterrestrialWPerM2: number;
	elevationDeg: number;
	/** τb and τd of the place and month. */
	beamDepth: number;
	diffuseDepth: number;
	edition: TauEdition;
}

/**
 * Sun and sky light under a clear sky by the method of two optical depths.
 *
 *     Eb = E0 exp(−τb m^ab),   Ed = E0 exp(−τd m^ad)
 *     2009:  ab = 1.219 − 0.043 τb − 0.151 τd − 0.204 τb τd,   ad = 0.202 + 0.852 τb − 0.007 τd − 0.357 τb τd
 *     2013:  ab = 1.454 − 0.406 τb − 0.268 τd + 0.021 τb τd,   ad = 0.507 + 0.205 τb − 0.080 τd − 0.190 τb τd
 *
 * @param sky E0 in W/m², elevation in °, τb and τd of the place and month, and the edition that they come from
 * @returns Eb on a plane that faces the sun and Ed on a level one, W/m²
 * @throws EngineInputError outside 0…90°, for an E0 not above zero, or for depths outside 0.1…1.5 (τb) and 1…4 (τd)
 * Validity: cloudless days; the depths of a place are published for each month.
 * Source: ASHRAE Handbook Fundamentals 2009 and 2013 (unchanged in 2017), ch. 14, air mass exponents. Programs disagree on the
 *   last sign of ab of 2013: + in EnergyPlus and four more that were compared, − in three; the handbook itself was not at hand.
 * @example
 * tauClearSky({ extraterrestrialWPerM2: 1410, elevationDeg: 60, beamDepth: 0.4, diffuseDepth: 2.2, edition: 2009 }).beamWPerM2; // 906.68
 */
export function tauClearSky(sky: TauSky): { beamWPerM2: number; diffuseWPerM2: number } {
	const { extraterrestrialWPerM2: outsideWPerM2, elevationDeg, beamDepth, diffuseDepth, edition } = sky;
	requirePositive({ outsideWPerM2 });
	requireWithin(0.1, 1.5, { beamDepth });
	requireWithin(1, 4, { diffuseDepth });
	const airMass = relativeAirMass(elevationDeg);
	const exponent = ([constant, beam, diffuse, both]: readonly [number, number, number, number]) =>
		constant + beam * beamDepth + diffuse * diffuseDepth + both * beamDepth * diffuseDepth;
	const { beam, diffuse } = TAU_EXPONENTS[edition];
	return {
		beamWPerM2: outsideWPerM2 * Math.exp(-beamDepth * airMass ** exponent(beam)),
		diffuseWPerM2: outsideWPerM2 * Math.exp(-diffuseDepth * airMass ** exponent(diffuse))
	};
}

/**
 * Sun and sky light together on a level plane under a clear sky, from the elevation alone.
 *
 *     E = 1098 sin h exp(−0.059 / sin h)
 *
 * @param elevationDeg h, °
 * @returns irradiance, W/m²; nothing at the horizon
 * @throws EngineInputError outside 0…90°
 * Validity: average clear sky of middle latitudes near sea level.
 * Source: Haurwitz, Journal of Meteorology 2 (1945) 154, as in Reno, Hansen, Stein, SAND2012-2389, 2012.
 * @example
 * haurwitzWPerM2(30); // 487.89
 */
export function haurwitzWPerM2(elevationDeg: number): number {
	requireWithin(0, 90, { elevationDeg });
	const sine = sinDeg(elevationDeg);
	return sine === 0 ? 0 : 1098 * sine * Math.exp(-0.059 / sine);
}
