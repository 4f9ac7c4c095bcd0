/** How a residual of u standard deviations counts. */
export type LossName = 'squares' | 'soft-l1' | 'huber';

/** Beyond this many standard deviations a residual counts less and less. */
const SOFT_SCALE = 2;
const HUBER_SCALE = 1.345;

export interface Loss {
	/** The number whose square is the loss: ρ(u) = root², with the sign of u. */
	root: (u: number) => number;
	/** Its derivative over u. */
	rootSlope: (u: number) => number;
	/** ψ = ½ ρ′: what a residual pulls with. */
	pull: (u: number) => number;
	/** ψ′. */
	pullSlope: (u: number) => number;
}

const grow = (u: number): number => Math.sqrt(1 + (u / SOFT_SCALE) ** 2);

/**
 * Losses, each as a sum of squares of its roots, so that least squares can make it least.
 *
 *     squares  ρ = u²
 *     soft-l1  ρ = 2 c² (√(1 + (u/c)²) − 1),  c = 2
 *     huber    ρ = u² up to c, 2 c |u| − c² beyond,  c = 1.345: 95 % of the efficiency of squares on normal residuals
 *
 * Validity: u in standard deviations of a good residual.
 * Source: Huber, Robust Statistics (1981), sections 4.5 and 7.6; soft-l1 is the pseudo-Huber function of Hartley and Zisserman,
 * Multiple View Geometry, 2nd ed. (2003), appendix 6.8, from memory.
 */
export const LOSSES: Readonly<Record<LossName, Loss>> = {
	squares: { root: (u) => u, rootSlope: () => 1, pull: (u) => u, pullSlope: () => 1 },
	'soft-l1': {
		root: (u) => u * Math.sqrt(2 / (1 + grow(u))),
		rootSlope: (u) => Math.sqrt((1 + grow(u)) / 2) / grow(u),
		pull: (u) => u / grow(u),
		pullSlope: (u) => 1 / grow(u) ** 3
	},
	huber: {
		root: (u) =>
			Math.abs(u) <= HUBER_SCALE
				? u
				: Math.sign(u) * Math.sqrt(2 * HUBER_SCALE * Math.abs(u) - HUBER_SCALE ** 2),
		rootSlope: (u) =>
			Math.abs(u) <= HUBER_SCALE
				? 1
				: HUBER_SCALE / Math.sqrt(2 * HUBER_SCALE * Math.abs(u) - HUBER_SCALE ** 2),
		pull: (u) => Math.sign(u) * Math.min(Math.abs(u), HUBER_SCALE),
		pullSlope: (u) => (Math.abs(u) <= HUBER_SCALE ? 1 : 0)
	}
};
