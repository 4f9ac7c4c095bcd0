import type { CoefficientEstimate } from './estimates';

/** From this share of the prior's spread on, the data are said to have told nothing of a coefficient. */
const STILL_AS_WIDE = 0.8;
/** From this correlation on, the data are said not to tell two coefficients apart. */
const ENTANGLED = 0.95;

type CoefficientName = Pick<CoefficientEstimate, 'group' | 'key'>;

/** What the data could not tell. */
export interface Untold {
	/** About as uncertain as before: what stands there is what was believed. */
	coefficients: (CoefficientName & { spreadLeft: number })[];
	/** Two of which the data see little more than a combination. */
	pairs: { first: CoefficientName; second: CoefficientName; correlation: number }[];
}

/** Names the coefficients that the data told nothing of and the pairs that they did not tell apart. */
export function findUntold(
	estimates: readonly CoefficientEstimate[],
	correlation: readonly (readonly number[])[]
): Untold {
	const nameOf = ({ group, key }: CoefficientEstimate): CoefficientName => ({ group, key });
	return {
		coefficients: estimates
			.filter(({ spreadLeft }) => spreadLeft >= STILL_AS_WIDE)
			.map((estimate) => ({ ...nameOf(estimate), spreadLeft: estimate.spreadLeft })),
		pairs: estimates.flatMap((first, a) =>
			estimates.slice(a + 1).flatMap((second, k) => {
				const shared = correlation[a]![a + 1 + k]!;
				if (Math.abs(shared) < ENTANGLED) return [];
				return [{ first: nameOf(first), second: nameOf(second), correlation: shared }];
			})
		)
	};
}
