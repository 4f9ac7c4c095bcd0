import { requireFraction, requirePositive } from './require';

/**
 * View factor back from surface 2 to surface 1, from the one there.
 *
 *     F21 = (A1/A2) F12
 *
 * @param viewFactor12 F12, 0 < F ≤ 1
 * @param area1M2 area of surface 1, m²
 * @param area2M2 area of surface 2, m²
 * @returns F21
 * @throws EngineInputError when F12 is not within 0 < F ≤ 1 or an area not above zero
 * Validity: diffuse surfaces, any shapes.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 13.3.
 * @example
 * viewFactorBack(1, Math.PI, 6); // 0.5236
 */
export function viewFactorBack(viewFactor12: number, area1M2: number, area2M2: number): number {
	requireFraction({ viewFactor12 });
	requirePositive({ area1M2, area2M2 });
	return (area1M2 / area2M2) * viewFactor12;
}

/** A point of a cross-section, m. */
export type SectionPoint = readonly [number, number];
/** The two ends of a long strip in cross-section. */
export type SectionStrip = readonly [SectionPoint, SectionPoint];

const distance = ([x1, y1]: SectionPoint, [x2, y2]: SectionPoint): number => Math.hypot(x2 - x1, y2 - y1);

/**
 * View factor between two long flat strips, from the lengths of strings stretched between their edges.
 *
 *     F12 = (Σ crossed strings − Σ uncrossed strings) / (2 × width of strip 1)
 *
 * @param strip1 ends of the strip that sends, in cross-section, m
 * @param strip2 ends of the strip that receives: its first end the one opposite the first end of strip 1
 * @returns F12, 0…1
 * @throws EngineInputError when strip 1 has no width
 * Validity: strips that are long against their distance and see one another wholly.
 * Source: Hottel's crossed strings: Modest, Radiative Heat Transfer, 2nd ed. 2003, section 4.7 (section from memory).
 * @example
 * viewFactorLongStrips([[0, 0], [1, 0]], [[0, 1], [1, 1]]); // 0.41421
 */
export function viewFactorLongStrips([a, b]: SectionStrip, [c, d]: SectionStrip): number {
	const strip1WidthM = distance(a, b);
	requirePositive({ strip1WidthM });
	return (distance(a, d) + distance(b, c) - distance(a, c) - distance(b, d)) / (2 * strip1WidthM);
}
