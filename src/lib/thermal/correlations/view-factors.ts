import { requirePositive } from './require';

/**
 * View factor from disc 1 to disc 2, parallel and on one axis.
 *
 *     R1 = r1/L,  R2 = r2/L,  S = 1 + (1 + R2²)/R1²
 *     F12 = ½ { S − [S² − 4 (r2/r1)²]^½ }
 *
 * @param radius1M radius of the disc that sends, m
 * @param radius2M radius of the disc that receives, m
 * @param gapM distance between the two planes, m
 * @returns F12, 0…1
 * @throws EngineInputError when a length is not finite and above zero
 * Validity: diffuse grey discs of uniform temperature, any positive sizes.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., Table 13.2.
 * @example
 * viewFactorCoaxialDiscs(0.25, 0.5, 1); // 0.19224
 */
export function viewFactorCoaxialDiscs(radius1M: number, radius2M: number, gapM: number): number {
	requirePositive({ radius1M, radius2M, gapM });
	const ratio1 = radius1M / gapM;
	const ratio2 = radius2M / gapM;
	const s = 1 + (1 + ratio2 ** 2) / ratio1 ** 2;
	const product = (radius2M / radius1M) ** 2;
	// The smaller root of F² − S F + product = 0, written so that nothing cancels when the discs are far apart.
	return (2 * product) / (s + Math.sqrt(s ** 2 - 4 * product));
}

/**
 * View factor between two equal rectangles, parallel and straight across from one another.
 *
 *     x = X/L,  y = Y/L
 *     F = 2/(π x y) { ln[(1+x²)(1+y²)/(1+x²+y²)]^½ + x √(1+y²) atan(x/√(1+y²))
 *                     + y √(1+x²) atan(y/√(1+x²)) − x atan x − y atan y }
 *
 * @param widthM side X of both, m
 * @param heightM side Y of both, m
 * @param gapM distance L between the planes, m
 * @returns F12 = F21, 0…1
 * @throws EngineInputError when a length is not finite and above zero
 * Validity: diffuse grey rectangles; cancellation costs digits below X/L or Y/L of about 1e-4.
 * Source: Incropera et al., 6th ed., Table 13.2.
 * @example
 * viewFactorParallelRectangles(1, 1, 1); // 0.19982
 */
export function viewFactorParallelRectangles(widthM: number, heightM: number, gapM: number): number {
	requirePositive({ widthM, heightM, gapM });
	const x = widthM / gapM;
	const y = heightM / gapM;
	const ax = Math.sqrt(1 + x ** 2);
	const ay = Math.sqrt(1 + y ** 2);
	const logPart = Math.log((ax * ay) / Math.sqrt(1 + x ** 2 + y ** 2));
	const anglePart =
		x * ay * Math.atan(x / ay) + y * ax * Math.atan(y / ax) - x * Math.atan(x) - y * Math.atan(y);
	return (2 / (Math.PI * x * y)) * (logPart + anglePart);
}

/**
 * View factor from rectangle 1 to rectangle 2 that meet at a right angle along a common edge.
 *
 *     H = height2/edge,  W = width1/edge,  A = (1+W²)(1+H²)/(1+W²+H²)
 *     F12 = 1/(π W) ( W atan(1/W) + H atan(1/H) − √(H²+W²) atan(1/√(H²+W²))
 *           + ¼ ln{ A [W²(1+W²+H²)/((1+W²)(W²+H²))]^(W²) [H²(1+H²+W²)/((1+H²)(H²+W²))]^(H²) } )
 *
 * @param edgeM length of the common edge, m
 * @param width1M depth of the rectangle that sends, m
 * @param height2M height of the rectangle that receives, m
 * @returns F12, 0…1
 * @throws EngineInputError when a length is not finite and above zero
 * Validity: diffuse grey rectangles that share the whole edge.
 * Source: Incropera et al., 6th ed., Table 13.2.
 * @example
 * viewFactorPerpendicularRectangles(1, 1, 1); // 0.20004
 */
export function viewFactorPerpendicularRectangles(edgeM: number, width1M: number, height2M: number): number {
	requirePositive({ edgeM, width1M, height2M });
	const w = width1M / edgeM;
	const h = height2M / edgeM;
	const w2 = w ** 2;
	const h2 = h ** 2;
	const all = 1 + w2 + h2;
	const diagonal = Math.sqrt(w2 + h2);
	const angles = w * Math.atan(1 / w) + h * Math.atan(1 / h) - diagonal * Math.atan(1 / diagonal);
	const logs =
		Math.log(((1 + w2) * (1 + h2)) / all) +
		w2 * Math.log((w2 * all) / ((1 + w2) * (w2 + h2))) +
		h2 * Math.log((h2 * all) / ((1 + h2) * (w2 + h2)));
	return (angles + logs / 4) / (Math.PI * w);
}
