import { requirePositive, requireWithin } from '../correlations/require';

/** Makers rate fuses here. */
const RATED_C = 23;
const CHANGE_PER_K = 0.002;
/** Share of its rating that a fuse carries for years. */
const CONTINUOUS_SHARE = 0.8;
/** Multiple of its rating at which a fuse surely opens within minutes. */
const SURELY_OPENS = 1.35;

/**
 * What a blade or bolted fuse is worth in warm air.
 *
 *     I(T) = I₂₃ [ 1 − 0.002 (T − 23) ]
 *
 * @param ratedA rating printed on the fuse, A, above zero
 * @param airC air around the fuse, °C
 * @returns rating that it has there, A
 * @throws EngineInputError when the rating is not above zero, or outside −40 to 125 °C
 * Validity: a straight line through typical curves; each maker's own curve overrides it.
 * Source: common practice, no source; the curve of the fuse at hand is the reference.
 * @example
 * fuseRatingAtA(100, 85); // 87.6
 */
export function fuseRatingAtA(ratedA: number, airC: number): number {
	requirePositive({ ratedA });
	requireWithin(-40, 125, { airC });
	return ratedA * (1 - CHANGE_PER_K * (airC - RATED_C));
}

/**
 * Current that a fuse carries for years without opening where it should not.
 *
 *     I = 0.8 I(T)
 *
 * @param ratedA rating printed on the fuse, A, above zero
 * @param airC air around the fuse, °C
 * @returns current, A
 * @throws EngineInputError when the rating is not above zero, or outside −40 to 125 °C
 * Validity: as fuseRatingAtA; steady current, no inrush.
 * Source: common practice, no source (makers ask for 70 to 80 %).
 * @example
 * fuseContinuousA(100, 23); // 80
 */
export function fuseContinuousA(ratedA: number, airC: number): number {
	return CONTINUOUS_SHARE * fuseRatingAtA(ratedA, airC);
}

/**
 * Current at which a fuse surely opens within half an hour.
 *
 *     I = 1.35 I(T)
 *
 * @param ratedA rating printed on the fuse, A, above zero
 * @param airC air around the fuse, °C
 * @returns current, A
 * @throws EngineInputError when the rating is not above zero, or outside −40 to 125 °C
 * Validity: blade fuses for road vehicles; bolted ones may need more time.
 * Source: ISO 8820-3, operating times at 135 % of the rating (from memory).
 * @example
 * fuseSurelyOpensA(100, 23); // 135
 */
export function fuseSurelyOpensA(ratedA: number, airC: number): number {
	return SURELY_OPENS * fuseRatingAtA(ratedA, airC);
}
