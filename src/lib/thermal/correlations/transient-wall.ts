import { requireNotBelow, requirePositive, requireWithin } from './require';

/**
 * How a body's resistance to heat inside compares with the film outside.
 *
 *     Bi = h L / k      (below 0.1 the body is near one temperature: about 5 % error or less)
 *
 * @param filmWPerM2K h, W/m²K
 * @param lengthM half the thickness of a wall, volume over surface of a body, m
 * @param conductivityWPerMK k of the body, W/mK
 * @returns Bi, without unit
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: any body.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 5.9 and 5.10.
 * @example
 * biot(500, 0.04, 63.9); // 0.313
 */
export function biot(filmWPerM2K: number, lengthM: number, conductivityWPerMK: number): number {
	requirePositive({ filmWPerM2K, lengthM, conductivityWPerMK });
	return (filmWPerM2K * lengthM) / conductivityWPerMK;
}

/**
 * Smallest root that a plane wall's cooling goes by.
 *
 *     ζ tan ζ = Bi,   0 < ζ < π/2
 *
 * @param biotNumber Bi over half the thickness
 * @returns ζ, radians
 * @throws EngineInputError outside 0 < Bi ≤ 1e6
 * Validity: a wall cooled alike on both sides, or on one and insulated on the other.
 * Source: Incropera et al., 6th ed., eq. 5.39c and Table 5.1.
 * @example
 * planeWallRoot(0.313); // 0.5319
 */
export function planeWallRoot(biotNumber: number): number {
	requirePositive({ biotNumber });
	requireWithin(0, 1e6, { biotNumber });
	let low = 0;
	let high = Math.PI / 2;
	for (;;) {
		const middle = (low + high) / 2;
		if (middle === low || middle === high) return middle;
		if (middle * Math.tan(middle) < biotNumber) low = middle;
		else high = middle;
	}
}

/** A wall that a film warms or cools. */
export interface WallInFilm {
	biotNumber: number;
	/** Fo = α t/L², L half the thickness. */
	fourierNumber: number;
	/** 0 in the middle (or at the insulated face), 1 at the surface. */
	depthShare: number;
}

/**
 * What is left of the difference between a wall and the fluid about it.
 *
 *     θ = C exp(−ζ² Fo) cos(ζ x/L),   C = 4 sin ζ / (2 ζ + sin 2ζ)
 *
 * @param wall Biot number, Fourier number and place within the wall
 * @returns θ = (T − Tfluid)/(Tstart − Tfluid)
 * @throws EngineInputError outside 0 < Bi ≤ 1e6, for Fo below 0.2 or a place outside 0…1
 * Validity: Fo ≥ 0.2, where the first term of the series is all but 2 % of it; even temperature at the start.
 * Source: Incropera et al., 6th ed., eq. 5.40.
 * @example
 * planeWallShare({ biotNumber: 0.313, fourierNumber: 5.64, depthShare: 1 }); // 0.183
 */
export function planeWallShare({ biotNumber, fourierNumber, depthShare }: WallInFilm): number {
	requireNotBelow(0.2, { fourierNumber });
	requireWithin(0, 1, { depthShare });
	const root = planeWallRoot(biotNumber);
	const amplitude = (4 * Math.sin(root)) / (2 * root + Math.sin(2 * root));
	return amplitude * Math.exp(-(root ** 2) * fourierNumber) * Math.cos(root * depthShare);
}
