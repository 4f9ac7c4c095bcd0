import { requirePositive } from '../correlations/require';
import { betaQuantile } from '../statistics';

/** Beyond this many degrees of freedom the distribution is the normal one to five digits. */
const MOST_DEGREES = 1e5;

/**
 * How many standard deviations hold a share of Student's distribution on both sides of its middle.
 *
 *     t = √(ν x/(1 − x)),   I_x(½, ν/2) = share
 *
 * @param share above 0 and below 1
 * @param degrees ν: degrees of freedom, above 0; from 100,000 on taken as that
 * @returns t, above 0
 * @throws EngineInputError when the share is not above 0 or the degrees of freedom are not
 * Validity: as betaQuantile.
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.6.6.4, with 8.17.2 of the NIST Digital Library; from memory.
 * @example
 * studentReach(0.9, 10); // 1.8125
 */
export function studentReach(share: number, degrees: number): number {
	requirePositive({ share, degrees });
	const nu = Math.min(degrees, MOST_DEGREES);
	const x = betaQuantile(share, 0.5, nu / 2);
	return Math.sqrt((nu * x) / (1 - x));
}
