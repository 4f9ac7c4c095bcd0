import { KELVIN_AT_ZERO_C, STEFAN_BOLTZMANN } from './radiation';
import {
	EngineInputError,
	requireFraction,
	requireNotBelow,
	requirePositive,
	requireWithin
} from './require';
import { solveLinear } from './small-linear';

/** One surface of an enclosure; without a temperature it passes on what it receives (insulated behind, re-radiating). */
export interface GreySurface {
	areaM2: number;
	emissivity: number;
	tempC: number | null;
}

/** What an enclosure's radiation comes to, surface by surface. */
export interface EnclosureBalance {
	/** What leaves each surface, its own and reflected, W/m². */
	radiosityWPerM2: number[];
	/** Net heat that each surface gives, W; zero for one that re-radiates. */
	heatW: number[];
	/** Given, or the one at which a re-radiating surface settles, °C. */
	tempC: number[];
}

/** How far view factors may be from summing to one and from reciprocity: charts are read to two digits. */
const VIEW_TOLERANCE = 0.01;

function requireEnclosed(surfaces: readonly GreySurface[], views: readonly (readonly number[])[]): void {
	requireWithin(surfaces.length, surfaces.length, { viewFactorRows: views.length });
	views.forEach((row, i) => {
		requireWithin(surfaces.length, surfaces.length, { viewFactorColumns: row.length });
		for (const viewFactor of row) requireWithin(0, 1, { viewFactor });
		requireWithin(1 - VIEW_TOLERANCE, 1 + VIEW_TOLERANCE, {
			viewFactorSum: row.reduce((sum, f) => sum + f, 0)
		});
		for (let j = 0; j < i; j++) {
			const [there, back] = [surfaces[i]!.areaM2 * row[j]!, surfaces[j]!.areaM2 * views[j]![i]!];
			if (Math.abs(there - back) > VIEW_TOLERANCE * Math.max(there, back)) {
				throw new EngineInputError('viewFactorReciprocity', there / back, 'A1 F12 = A2 F21 within 1 %');
			}
		}
	});
}

const blackEmission = (tempC: number): number => STEFAN_BOLTZMANN * (tempC + KELVIN_AT_ZERO_C) ** 4;

/**
 * Radiation between all surfaces of an enclosure, with surfaces that re-radiate among them.
 *
 *     given temperature:  Ji = εi σ Ti⁴ + (1 − εi) Σ Fij Jj,   qi = Ai (Ji − Σ Fij Jj)
 *     re-radiating:       Ji = Σ Fij Jj,  qi = 0,  σ Ti⁴ = Ji
 *
 * @param surfaces area in m², emissivity, and temperature in °C or null for a surface that re-radiates
 * @param viewFactors Fij, row i from surface i
 * @returns radiosity in W/m², net heat in W and temperature in °C of each surface
 * @throws EngineInputError when an area, an emissivity or a temperature cannot be, no temperature is given at all, or the
 *   view factors do not sum to one a row and obey reciprocity within 1 %
 * Validity: grey diffuse surfaces, each at one temperature and evenly lit; air that neither absorbs nor emits.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., section 13.3 (eq. 13.19 to 13.21, 13.30).
 * @example
 * solveGreyEnclosure([{ areaM2: 1, emissivity: 1, tempC: 100 }, { areaM2: 1, emissivity: 1, tempC: 0 }], [[0, 1], [1, 0]]).heatW[0]; // 783.7
 */
export function solveGreyEnclosure(
	surfaces: readonly GreySurface[],
	viewFactors: readonly (readonly number[])[]
): EnclosureBalance {
	for (const { areaM2, emissivity, tempC } of surfaces) {
		requirePositive({ areaM2 });
		requireFraction({ emissivity });
		if (tempC !== null) requireNotBelow(-KELVIN_AT_ZERO_C, { tempC });
	}
	requirePositive({ givenTemperatures: surfaces.filter(({ tempC }) => tempC !== null).length });
	requireEnclosed(surfaces, viewFactors);
	const reflected = surfaces.map(({ emissivity, tempC }) => (tempC === null ? 1 : 1 - emissivity));
	const radiosityWPerM2 = solveLinear(
		viewFactors.map((row, i) => row.map((f, j) => (i === j ? 1 : 0) - reflected[i]! * f)),
		surfaces.map(({ emissivity, tempC }) => (tempC === null ? 0 : emissivity * blackEmission(tempC)))
	);
	const received = viewFactors.map((row) => row.reduce((sum, f, j) => sum + f * radiosityWPerM2[j]!, 0));
	return {
		radiosityWPerM2,
		heatW: surfaces.map(({ areaM2, tempC }, i) =>
			tempC === null ? 0 : areaM2 * (radiosityWPerM2[i]! - received[i]!)
		),
		tempC: surfaces.map(
			({ tempC }, i) => tempC ?? (radiosityWPerM2[i]! / STEFAN_BOLTZMANN) ** 0.25 - KELVIN_AT_ZERO_C
		)
	};
}

/** One face of a concentric arrangement. */
export interface ConcentricFace {
	areaM2: number;
	emissivity: number;
}

/** A thin shield between two faces; it has another finish inside than outside. */
export interface ConcentricShield {
	areaM2: number;
	emissivityInside: number;
	emissivityOutside: number;
}

/**
 * The conductance for radiation between a body and what encloses it closely, with shields round it.
 *
 *     1/G = 1/(A1 ε1) + (1 − ε2)/(A2 ε2) + Σ [ (1 − εi)/(As εi) + 1/(As εo) ]      (one term of the sum for each shield)
 *
 * @param inner the body: area in m² and emissivity
 * @param outer what encloses it
 * @param shields from the inside outwards: area, emissivity of the face towards the body and of the face away from it
 * @returns G, m²: the heat is G σ (T1⁴ − T2⁴)
 * @throws EngineInputError when an area is not above zero or an emissivity not within 0 < ε ≤ 1
 * Validity: long concentric cylinders, spheres, or any body in a convex shell of even radiosity; grey diffuse surfaces.
 * Source: Incropera et al., 6th ed., Table 13.3 and eq. 13.25, 13.28.
 * @example
 * exchangeAreaConcentric({ areaM2: 1, emissivity: 0.9 }, { areaM2: 4, emissivity: 0.8 }); // 0.85207
 */
export function exchangeAreaConcentric(
	inner: ConcentricFace,
	outer: ConcentricFace,
	shields: readonly ConcentricShield[] = []
): number {
	for (const { areaM2, emissivity } of [inner, outer]) {
		requirePositive({ areaM2 });
		requireFraction({ emissivity });
	}
	let resistancePerM2 =
		1 / (inner.areaM2 * inner.emissivity) + (1 - outer.emissivity) / (outer.areaM2 * outer.emissivity);
	for (const { areaM2, emissivityInside, emissivityOutside } of shields) {
		requirePositive({ areaM2 });
		requireFraction({ emissivityInside, emissivityOutside });
		resistancePerM2 +=
			(1 - emissivityInside) / (areaM2 * emissivityInside) + 1 / (areaM2 * emissivityOutside);
	}
	return 1 / resistancePerM2;
}
