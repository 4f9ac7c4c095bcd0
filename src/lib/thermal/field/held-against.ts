import { requireNotBelow, requirePositive } from '../correlations/require';
import { NINE_OF_TEN } from './cut-out-report';
import type { PeakSpread } from './peak-spread';
import { checkReading, type FieldReading } from './readings';

/** Where what was measured lies of the band that was stated. */
export const STANDS = ['inside', 'above', 'below'] as const;
export type Stand = (typeof STANDS)[number];

/** A measurement held against what was predicted of it, all in the unit of what was measured. */
export interface Held {
	/** Null where a label says one side only: hotter than, or not as hot as. */
	measured: number | null;
	predicted: number;
	/** The stated band. */
	low: number;
	high: number;
	/** Measured less predicted; null where nothing was measured to the number. */
	error: number | null;
	/** The error in stated standard deviations; of one side only, how far it gainsays the prediction at least. */
	deviations: number;
	stand: Stand;
}

export const standOf = (value: number, low: number, high: number): Stand =>
	value > high ? 'above' : value < low ? 'below' : 'inside';

const rootOfSquares = (...parts: readonly number[]): number =>
	Math.sqrt(parts.reduce((sum, part) => sum + part * part, 0));

/** What a label leaves open: its own tolerance, and anywhere between its two fields. */
function sigmaOfLabel(withinK: number, widthK: number): number {
	return rootOfSquares(withinK / NINE_OF_TEN, widthK / Math.sqrt(12));
}

/** What a prediction says, without how it came about. */
type Spread = Pick<PeakSpread, 'lowC' | 'middleC' | 'highC' | 'sdK'>;

/** The stated band, widened by what the measurement itself leaves open. */
function bandOf({ lowC, middleC, highC }: Spread, sigmaK: number): { low: number; high: number } {
	const reachK = NINE_OF_TEN * sigmaK;
	return {
		low: middleC - rootOfSquares(middleC - lowC, reachK),
		high: middleC + rootOfSquares(highC - middleC, reachK)
	};
}

/**
 * A measured temperature against what was predicted of it.
 *
 *     error = measured − middle;  deviations = error / √(σ_predicted² + σ_measured²)
 *     band: middle ∓ √(edge² + (1.6449 σ_measured)²)
 *
 * @param measuredC what was measured, °C
 * @param spread what was predicted: middle, edges of the nine-in-ten band (°C) and standard deviation (K)
 * @param sigmaK what the measurement leaves open, K
 * @returns the measurement held against it, °C and K
 * Validity: errors of measurement and prediction independent; low ≤ middle ≤ high.
 * Source: sum of independent variances.
 * @example
 * holdMeasured(62, { lowC: 55, middleC: 60, highC: 65, sdK: 3 }, 0).stand; // 'inside'
 */
export function holdMeasured(measuredC: number, spread: Spread, sigmaK: number): Held {
	const { middleC, sdK } = spread;
	const { low, high } = bandOf(spread, sigmaK);
	const error = measuredC - middleC;
	const deviations = error / rootOfSquares(sdK, sigmaK);
	const stand = standOf(measuredC, low, high);
	return { measured: measuredC, predicted: middleC, low, high, error, deviations, stand };
}

/**
 * A label against the spread of the peak. The band is widened by what the label itself leaves open.
 *
 *     error = (turned + notTurned)/2 − middle;  σ² = σ_peak² + (within/1.6449)² + (notTurned − turned)²/12
 *     band: middle ∓ √(edge² + (1.6449 σ_label)²)
 *
 * @param reading the label; with one field only it says a side, and no error
 * @param spread what the estimate said of that day
 * @returns the label held against it, °C and K
 * @throws EngineInputError for a reading that cannot be
 * Validity: errors of label and estimate independent; the label's day as hot as was said.
 * Source: sum of independent variances; variance of an even law, width²/12.
 * @example
 * const label = { kind: 'peak-label', place: 'case', turnedC: 60, notTurnedC: 65, withinK: 1.6449 };
 * const spread = { samples: 8, seed: 1, lowC: 55, middleC: 60, highC: 65, sdK: 3 };
 * holdLabel(label, spread).error; // 2.5
 */
export function holdLabel(
	reading: Extract<FieldReading, { kind: 'peak-label' }>,
	{ lowC, middleC, highC, sdK }: PeakSpread
): Held {
	checkReading(reading);
	const { turnedC, notTurnedC, withinK } = reading;
	const isOpen = turnedC === null || notTurnedC === null;
	const sigmaK = sigmaOfLabel(withinK, isOpen ? 0 : notTurnedC - turnedC);
	const spread = { lowC, middleC, highC, sdK };
	if (!isOpen) return holdMeasured((turnedC + notTurnedC) / 2, spread, sigmaK);
	const { low, high } = bandOf(spread, sigmaK);
	// A field that turned says "at least", one that did not "at most": only beyond the prediction does it gainsay it.
	const beyondK = turnedC === null ? Math.min(notTurnedC! - middleC, 0) : Math.max(turnedC - middleC, 0);
	const stand = beyondK === 0 ? 'inside' : standOf(middleC + beyondK, low, high);
	const deviations = beyondK / rootOfSquares(sdK, sigmaK);
	return { measured: null, predicted: middleC, low, high, error: null, deviations, stand };
}

/** A test is right to this share of the capacity, and a new battery holds its rated capacity to this: judgement. */
const TEST_SIGMA = 0.02;
const NEW_SIGMA = 0.05;

/** What is expected to be left of the capacity after some years. */
export interface LifePoint {
	years: number;
	low: number;
	middle: number;
	high: number;
}

/** In straight lines from a full capacity when new; null beyond the last year. */
function lifeAt(band: readonly LifePoint[], years: number): Omit<LifePoint, 'years'> | null {
	const points = [{ years: 0, low: 1, middle: 1, high: 1 }, ...band];
	const next = points.findIndex((point) => point.years >= years);
	if (next < 0) return null;
	if (next === 0) return points[0]!;
	const [from, to] = [points[next - 1]!, points[next]!];
	const part = (years - from.years) / (to.years - from.years);
	const at = (key: 'low' | 'middle' | 'high'): number => from[key] + part * (to[key] - from[key]);
	return { low: at('low'), middle: at('middle'), high: at('high') };
}

/**
 * A capacity test against the ageing band at its age.
 *
 *     error = share − middle(years);  σ² = (high − low)²/12 + 0.02² + 0.05²
 *
 * @param share measured share of the rated capacity, at the reference temperature
 * @param years since fitted
 * @param band the ageing band year by year, from the first on, in order
 * @returns the test held against it, in shares; null beyond the band's last year
 * @throws EngineInputError when the share is not above 0 or the years are below 0
 * Validity: a battery that was new when it was fitted.
 * Source: variance of an even law for a band of models that disagree; the errors of 2 % and 5 % are judgement.
 * @example
 * holdCapacity(0.9, 1, [{ years: 1, low: 0.94, middle: 0.96, high: 0.98 }]).stand; // 'below'
 */
export function holdCapacity(share: number, years: number, band: readonly LifePoint[]): Held | null {
	requirePositive({ share });
	requireNotBelow(0, { years });
	const at = lifeAt(band, years);
	if (at === null) return null;
	const { low, middle, high } = at;
	const error = share - middle;
	const sigma = rootOfSquares((high - low) / Math.sqrt(12), TEST_SIGMA, NEW_SIGMA);
	return {
		...{ measured: share, predicted: middle, low, high, error },
		...{ deviations: error / sigma, stand: standOf(share, low, high) }
	};
}
