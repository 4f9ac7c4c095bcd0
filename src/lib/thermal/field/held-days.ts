import { EngineInputError, requireNotBelow } from '../correlations/require';
import { expOf } from '../solve/elementary';
import { normalCdf, normalQuantile } from '../statistics';
import { standOf, type Held } from './held-against';

/** So many days at most are counted one by one; beyond, the normal law is as good. */
const MOST_COUNTED = 1_000;
const EDGE = 0.05;
const LEAST_SHARE = 1e-9;

/** A few equal-minded vehicles in place of many, each with its own steady expectation. */
type Mixture = readonly { weight: number; days: number }[];

/** The low, a middle and the high, three, four and three of ten, with the mean kept. */
function mixtureOf({ low, middle: mean, high }: StatedDays): Mixture {
	const between = Math.max((mean - 0.3 * (low + high)) / 0.4, 0);
	const sum = 0.3 * low + 0.4 * between + 0.3 * high;
	const factor = sum > 0 ? mean / sum : 1;
	return [
		{ weight: 0.3, days: low * factor },
		{ weight: 0.4, days: between * factor },
		{ weight: 0.3, days: high * factor }
	];
}

/** Chance of at most so many days; of −1 none. */
function chanceOfAtMost(count: number, mixture: Mixture): number {
	if (count < 0) return 0;
	return mixture.reduce((sum, { weight, days }) => sum + weight * poissonAtMost(count, days), 0);
}

function poissonAtMost(count: number, days: number): number {
	if (days > MOST_COUNTED) return normalCdf((count + 0.5 - days) / Math.sqrt(days));
	let term = expOf(-days);
	// Too small for a number: everything counted so far lies far below.
	if (term === 0) return normalCdf((count + 0.5 - days) / Math.sqrt(days));
	let sum = term;
	for (let k = 1; k <= count; k++) {
		term *= days / k;
		sum += term;
	}
	return Math.min(sum, 1);
}

function countAtShare(share: number, mixture: Mixture): number {
	const most = Math.max(...mixture.map(({ days }) => days));
	let [low, high] = [-1, Math.ceil(most + 10 * Math.sqrt(most) + 20)];
	while (high - low > 1) {
		const middle = Math.floor((low + high) / 2);
		if (chanceOfAtMost(middle, mixture) >= share) high = middle;
		else low = middle;
	}
	return high;
}

/** Days expected in the time that was watched: the mean, and what a tenth of the drawn vehicles stay below and exceed. */
export interface StatedDays {
	low: number;
	middle: number;
	high: number;
}

/** Days that were reported, held against those that were stated. */
export interface HeldDays extends Held {
	measured: number;
	error: number;
	/** The stated chance of at least one. */
	chance: number;
}

/**
 * Reported cut-out days against the days that were stated for the time watched.
 *
 *     P(K ≤ k) = Σ w Σ_{j≤k} e^(−λ) λ^j / j!,  three λ: low, middle, high with w = 0.3, 0.4, 0.3 and the mean kept
 *     deviations = Φ⁻¹(P(K < k) + P(K = k)/2);  chance = 1 − P(K = 0)
 *
 * @param reported days on which it was reported dark, a whole number
 * @param stated days that were to be expected in the time watched
 * @returns the days held against it, with the counts that hold nine of ten as the band
 * @throws EngineInputError when a figure is below 0, or out of order
 * Validity: days independent of each other once the vehicle is given; the spread of vehicles by three points.
 * Source: Poisson law; weights of 0.3, 0.4 and 0.3 after Swanson (Hurst, Brown and Swanson, AAPG Bulletin 84 (2000) 1883,
 * from memory); mid-p after Lancaster, J. Am. Stat. Assoc. 56 (1961) 223 (from memory).
 * @example
 * holdDays(0, { low: 1, middle: 1, high: 1 }).chance; // 0.632
 */
export function holdDays(reported: number, stated: StatedDays): HeldDays {
	requireNotBelow(0, { reported, low: stated.low, middle: stated.middle });
	if (!(stated.high >= stated.low)) {
		throw new EngineInputError('high', stated.high, `not below ${stated.low}`);
	}
	const mixture = mixtureOf(stated);
	const [below, upTo] = [chanceOfAtMost(reported - 1, mixture), chanceOfAtMost(reported, mixture)];
	const middleShare = Math.min(Math.max((below + upTo) / 2, LEAST_SHARE), 1 - LEAST_SHARE);
	const [low, high] = [countAtShare(EDGE, mixture), countAtShare(1 - EDGE, mixture)];
	return {
		...{ measured: reported, predicted: stated.middle, low, high, error: reported - stated.middle },
		deviations: normalQuantile(middleShare),
		stand: standOf(reported, low, high),
		chance: 1 - chanceOfAtMost(0, mixture)
	};
}
