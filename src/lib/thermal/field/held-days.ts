import { EngineInputError, requireNotBelow, requirePositive } from '../correlations/require';
import { expOf } from '../solve/elementary';
import { normalCdf, normalQuantile } from '../statistics';
import { standOf, type Held } from './held-against';

/** So many days at most are counted one by one; beyond, the normal law is as good. */
const MOST_COUNTED = 1_000;
const EDGE = 0.05;
const LEAST_SHARE = 1e-9;

/** Days expected in the time that was watched, or a year: the mean, and what a tenth of the drawn vehicles stay below and exceed. */
export interface StatedDays {
	low: number;
	middle: number;
	high: number;
}

const repeat = (days: number, times: number): number[] => Array.from({ length: times }, () => days);

/**
 * Ten equally likely vehicles for an expectation of which only mean and range are known.
 *
 *     three at low, four between, three at high; what is between keeps the mean, and where it cannot all are scaled
 *
 * @param stated expected days: mean, and what a tenth of the vehicles stay below and exceed
 * @returns expected days of each, fewest first
 * @throws EngineInputError when a figure is below 0, or the range out of order
 * Validity: a stand-in: it knows nothing of the shape between the ends.
 * Source: weights of 0.3, 0.4 and 0.3 after Swanson (Hurst, Brown and Swanson, AAPG Bulletin 84 (2000) 1883, from memory).
 * @example
 * tenVehicles({ low: 0, middle: 2, high: 4 })[4]; // 2
 */
export function tenVehicles({ low, middle: mean, high }: StatedDays): number[] {
	requireNotBelow(0, { low, middle: mean });
	if (!(high >= low)) throw new EngineInputError('high', high, `not below ${low}`);
	const between = Math.max((mean - 0.3 * (low + high)) / 0.4, 0);
	const sum = 0.3 * low + 0.4 * between + 0.3 * high;
	const factor = sum > 0 ? mean / sum : 1;
	const days = [...repeat(low, 3), ...repeat(between, 4), ...repeat(high, 3)];
	return days.map((each) => each * factor).sort((a, b) => a - b);
}

/** Chance of at most so many days; of −1 none. */
function chanceOfAtMost(count: number, vehicles: readonly number[]): number {
	if (count < 0) return 0;
	return vehicles.reduce((sum, days) => sum + poissonAtMost(count, days), 0) / vehicles.length;
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

function countAtShare(share: number, vehicles: readonly number[]): number {
	const most = Math.max(...vehicles);
	let [low, high] = [-1, Math.ceil(most + 10 * Math.sqrt(most) + 20)];
	while (high - low > 1) {
		const middle = Math.floor((low + high) / 2);
		if (chanceOfAtMost(middle, vehicles) >= share) high = middle;
		else low = middle;
	}
	return high;
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
 *     P(K ≤ k) = 1/n Σ_vehicles Σ_{j≤k} e^(−λ) λ^j / j!;   predicted = mean of λ
 *     deviations = Φ⁻¹(P(K < k) + P(K = k)/2);  chance = 1 − P(K = 0)
 *
 * @param reported days on which it was reported dark, a whole number
 * @param vehicles λ: days that were to be expected of each of some equally likely vehicles in the time watched
 * @returns the days held against it, with the counts that hold nine of ten as the band
 * @throws EngineInputError when a figure is below 0, or there is no vehicle
 * Validity: days independent of each other once the vehicle is given.
 * Source: Poisson law; mid-p after Lancaster, J. Am. Stat. Assoc. 56 (1961) 223 (from memory).
 * @example
 * holdDays(0, [1]).chance; // 0.632
 */
export function holdDays(reported: number, vehicles: readonly number[]): HeldDays {
	requirePositive({ vehicles: vehicles.length });
	requireNotBelow(0, { reported, fewest: Math.min(...vehicles) });
	const predicted = vehicles.reduce((sum, days) => sum + days, 0) / vehicles.length;
	const [below, upTo] = [chanceOfAtMost(reported - 1, vehicles), chanceOfAtMost(reported, vehicles)];
	const middleShare = Math.min(Math.max((below + upTo) / 2, LEAST_SHARE), 1 - LEAST_SHARE);
	const [low, high] = [countAtShare(EDGE, vehicles), countAtShare(1 - EDGE, vehicles)];
	return {
		...{ measured: reported, predicted, low, high, error: reported - predicted },
		deviations: normalQuantile(middleShare),
		stand: standOf(reported, low, high),
		chance: 1 - chanceOfAtMost(0, vehicles)
	};
}
