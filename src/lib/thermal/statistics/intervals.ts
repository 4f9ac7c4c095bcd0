import { EngineInputError, requirePositive } from '../correlations/require';
import { betaQuantile } from './beta';
import { gammaQuantile } from './gamma';
import { normalQuantile } from './normal';
import { requireWhole } from './require-whole';

export interface Interval {
	low: number;
	high: number;
}

function requireCounts(events: number, trials: number): void {
	requireWhole(1, Number.MAX_SAFE_INTEGER, { trials });
	requireWhole(0, trials, { events });
}

/** The share that an interval leaves out on each side. */
function tailOf(confidence: number): number {
	if (!(confidence > 0 && confidence < 1)) {
		throw new EngineInputError('confidence', confidence, 'above 0 and below 1');
	}
	return (1 - confidence) / 2;
}

/**
 * Interval for a proportion from the score test: short, right on average, sensible at 0 and at all.
 *
 *     (p + z²/2n ± z √(p(1−p)/n + z²/4n²)) / (1 + z²/n)
 *
 * @param events how often it happened, a whole number
 * @param trials how often it could have
 * @param confidence how sure, above 0 and below 1
 * @returns lowest and highest proportion, each 0…1
 * @throws EngineInputError when the counts are not whole, events exceed trials, or the confidence is not between 0 and 1
 * Validity: independent trials of one chance.
 * Source: Wilson, J. Am. Stat. Assoc. 22 (1927) 209; Newcombe, Statist. Med. 17 (1998) 857, method 3.
 * @example
 * wilsonInterval(0, 20, 0.95).high; // 0.1611
 */
export function wilsonInterval(events: number, trials: number, confidence: number): Interval {
	requireCounts(events, trials);
	const z = normalQuantile(1 - tailOf(confidence));
	const share = events / trials;
	const spread = (z * z) / trials;
	const middle = share + spread / 2;
	const reach = z * Math.sqrt((share * (1 - share)) / trials + spread / (4 * trials));
	return {
		low: events === 0 ? 0 : (middle - reach) / (1 + spread),
		high: events === trials ? 1 : (middle + reach) / (1 + spread)
	};
}

/**
 * Interval for a proportion that never covers less often than it says, and mostly more often.
 *
 *     low = B(α/2; k, n−k+1),  high = B(1−α/2; k+1, n−k)      (B: quantile of the beta distribution)
 *
 * @param events how often it happened, a whole number
 * @param trials how often it could have
 * @param confidence how sure, above 0 and below 1
 * @returns lowest and highest proportion, each 0…1
 * @throws EngineInputError when the counts are not whole, events exceed trials, or the confidence is not between 0 and 1
 * Validity: independent trials of one chance.
 * Source: Clopper and Pearson, Biometrika 26 (1934) 404; Newcombe, Statist. Med. 17 (1998) 857, method 5.
 * @example
 * clopperPearsonInterval(0, 20, 0.95).high; // 0.1684
 */
export function clopperPearsonInterval(events: number, trials: number, confidence: number): Interval {
	requireCounts(events, trials);
	const tail = tailOf(confidence);
	return {
		low: events === 0 ? 0 : betaQuantile(tail, events, trials - events + 1),
		high: events === trials ? 1 : betaQuantile(1 - tail, events + 1, trials - events)
	};
}

/**
 * Interval for a proportion from the beta distribution that Jeffreys' prior leaves behind.
 *
 *     low = B(α/2; k+½, n−k+½),  high = B(1−α/2; k+½, n−k+½);  low = 0 at k = 0, high = 1 at k = n
 *
 * @param events how often it happened, a whole number
 * @param trials how often it could have
 * @param confidence how sure, above 0 and below 1
 * @returns lowest and highest proportion, each 0…1
 * @throws EngineInputError when the counts are not whole, events exceed trials, or the confidence is not between 0 and 1
 * Validity: independent trials of one chance.
 * Source: Brown, Cai and DasGupta, Statistical Science 16 (2001) 101, section 3.1.
 * @example
 * jeffreysInterval(0, 20, 0.95).high; // 0.1166
 */
export function jeffreysInterval(events: number, trials: number, confidence: number): Interval {
	requireCounts(events, trials);
	const tail = tailOf(confidence);
	const [a, b] = [events + 0.5, trials - events + 0.5];
	return {
		low: events === 0 ? 0 : betaQuantile(tail, a, b),
		high: events === trials ? 1 : betaQuantile(1 - tail, a, b)
	};
}

/**
 * Interval for how many events are to be expected, from how many were counted.
 *
 *     low = G(α/2; k),  high = G(1−α/2; k+1)      (G: quantile of the gamma distribution)
 *
 * @param events how many were counted, a whole number
 * @param confidence how sure, above 0 and below 1
 * @returns lowest and highest expectation
 * @throws EngineInputError when the count is not a whole number up to a million, or the confidence is not between 0 and 1
 * Validity: independent events at a steady rate.
 * Source: Garwood, Biometrika 28 (1936) 437.
 * @example
 * poissonInterval(0, 0.95).high; // 3.6889
 */
export function poissonInterval(events: number, confidence: number): Interval {
	requireWhole(0, 1e6, { events });
	const tail = tailOf(confidence);
	return {
		low: events === 0 ? 0 : gammaQuantile(events, tail),
		high: gammaQuantile(events + 1, 1 - tail)
	};
}

/**
 * Interval for how many times as often something happens as was expected, from how often it was counted.
 *
 *     low = G(α/2; k)/E,  high = G(1−α/2; k+1)/E      (G: quantile of the gamma distribution)
 *
 * @param events how many were counted, a whole number
 * @param expected how many were expected, above zero and taken as known
 * @param confidence how sure, above 0 and below 1
 * @returns lowest and highest ratio of the true expectation to the one that was made
 * @throws EngineInputError as poissonInterval, and when the expectation is not above zero
 * Validity: independent events at a steady rate; what is uncertain about the expectation itself is not in it.
 * Source: Garwood, Biometrika 28 (1936) 437; divided by the expectation as for a standardised mortality ratio, Ulm, Am. J.
 *   Epidemiol. 131 (1990) 373 (from memory).
 * @example
 * poissonRatioInterval(10, 5, 0.95).high; // 3.6781
 */
export function poissonRatioInterval(events: number, expected: number, confidence: number): Interval {
	requirePositive({ expected });
	const { low, high } = poissonInterval(events, confidence);
	return { low: low / expected, high: high / expected };
}
