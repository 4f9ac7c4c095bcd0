import { EngineInputError, requirePositive, requireWithin } from '../correlations/require';
import { normalCdf, normalQuantile } from './normal';

/** How an unknown number may lie; every figure is in the unit of that number, but for `logSd`. */
export type Distribution =
	| { kind: 'uniform'; low: number; high: number }
	| { kind: 'triangular'; low: number; mode: number; high: number }
	| { kind: 'normal'; mean: number; sd: number }
	| { kind: 'truncated normal'; mean: number; sd: number; low: number; high: number }
	/** `logSd`: standard deviation of the natural logarithm, without unit. */
	| { kind: 'lognormal'; median: number; logSd: number };

type Of<K extends Distribution['kind']> = Extract<Distribution, { kind: K }>;

function requireBelow(low: number, high: number): void {
	if (!Number.isFinite(high)) throw new EngineInputError('high', high, 'a finite number');
	if (!(Number.isFinite(low) && low < high))
		throw new EngineInputError('low', low, `finite and below ${high}`);
}

function requireSpread(mean: number, sd: number): void {
	requirePositive({ sd });
	if (!Number.isFinite(mean)) throw new EngineInputError('mean', mean, 'a finite number');
}

/** Beyond this the double nearest to a share of the normal distribution is coarser than the share itself. */
const FARTHEST_SD = 37;

/** Counts from the nearer tail, where the shares are small and therefore exact. */
function truncatedNormal({ mean, sd, low, high }: Of<'truncated normal'>, share: number): number {
	requireSpread(mean, sd);
	requireBelow(low, high);
	const [from, to] = [(low - mean) / sd, (high - mean) / sd];
	requireWithin(-FARTHEST_SD, Infinity, { highInSd: to });
	requireWithin(-Infinity, FARTHEST_SD, { lowInSd: from });
	if (share === 0) return low;
	if (share === 1) return high;
	const mirrored = from > 0;
	const below = mirrored ? normalCdf(-to) : normalCdf(from);
	const above = mirrored ? normalCdf(-from) : normalCdf(to);
	const part = mirrored ? 1 - share : share;
	const size = normalQuantile(below + part * (above - below));
	return Math.min(high, Math.max(low, mean + sd * (mirrored ? -size : size)));
}

function triangular({ low, mode, high }: Of<'triangular'>, share: number): number {
	requireBelow(low, high);
	requireWithin(low, high, { mode });
	const width = high - low;
	const shareBelowMode = (mode - low) / width;
	if (share < shareBelowMode) return low + Math.sqrt(share * width * (mode - low));
	return high - Math.sqrt((1 - share) * width * (high - mode));
}

/**
 * The number below which a share of a distribution lies: turns evenly spread shares into a sample.
 *
 *     uniform           low + u (high − low)
 *     triangular        low + √(u w (mode − low)) up to the mode, high − √((1−u) w (high − mode)) above, w = high − low
 *     normal            mean + sd Φ⁻¹(u)
 *     truncated normal  mean + sd Φ⁻¹(Φ(a) + u (Φ(b) − Φ(a))), a and b the ends in standard deviations
 *     lognormal         median · exp(logSd Φ⁻¹(u))
 *
 * @param distribution kind and figures
 * @param share u: within 0 to 1; above 0 and below 1 where the distribution has no ends (scrambled points always are)
 * @returns the number, in the unit of the distribution's figures
 * @throws EngineInputError when ends are out of order, a spread is not above zero, or the share is outside its limits
 * Validity: a truncated normal may begin at most 37 standard deviations above its mean, or end as far below.
 * Source: inverse distribution functions in Evans, Hastings and Peacock, Statistical Distributions, 3rd ed. (2000).
 * @example
 * distributionQuantile({ kind: 'triangular', low: 0, mode: 1, high: 4 }, 0.25); // 1
 */
export function distributionQuantile(distribution: Distribution, share: number): number {
	requireWithin(0, 1, { share });
	switch (distribution.kind) {
		case 'uniform': {
			requireBelow(distribution.low, distribution.high);
			return distribution.low + share * (distribution.high - distribution.low);
		}
		case 'triangular':
			return triangular(distribution, share);
		case 'normal': {
			requireSpread(distribution.mean, distribution.sd);
			return distribution.mean + distribution.sd * normalQuantile(share);
		}
		case 'truncated normal':
			return truncatedNormal(distribution, share);
		case 'lognormal': {
			requirePositive({ median: distribution.median, logSd: distribution.logSd });
			return distribution.median * Math.exp(distribution.logSd * normalQuantile(share));
		}
	}
}
