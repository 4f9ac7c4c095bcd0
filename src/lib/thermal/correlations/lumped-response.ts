import { EngineInputError, requireNotBelow, requirePositive } from './require';

/**
 * How long a body of one temperature takes to come to another in air that stays as it is.
 *
 *     t = τ ln[(Tstart − Tair)/(Ttarget − Tair)],   τ = C/G
 *
 * @param timeConstant τ in any unit of time
 * @param startC where the body starts, °C
 * @param targetC where it is to come, °C
 * @param airC the air, °C
 * @returns t, in the unit of τ
 * @throws EngineInputError when τ is not above zero, or when the target is the air itself or does not lie between start and air
 * Validity: Biot number below about 0.1; constant film and air.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., eq. 5.5.
 * @example
 * timeToReach(4, 65, 55, 40); // 2.0433
 */
export function timeToReach(timeConstant: number, startC: number, targetC: number, airC: number): number {
	requirePositive({ timeConstant });
	requireNotBelow(-273.15, { startC, targetC, airC });
	const share = (startC - airC) / (targetC - airC);
	if (!(share >= 1 && Number.isFinite(share))) {
		throw new EngineInputError('targetC', targetC, `between ${startC} and ${airC}, and not the latter`);
	}
	return timeConstant * Math.log(share);
}

/**
 * What a body of one temperature makes of a wave of the air about it.
 *
 *     height = 1/√(1 + (ω τ)²),   lag = atan(ω τ)/ω,   ω = 2π/period
 *
 * @param timeConstant τ, in the unit of the period
 * @param period of the wave
 * @returns height as a share of the air's, and how late, in the unit of the period
 * @throws EngineInputError when a value is not finite and above zero
 * Validity: a sine wave that has gone on for several τ.
 * Source: closed form of the linear balance of one node.
 * @example
 * waveResponse(4, 24).height; // 0.69062
 */
export function waveResponse(timeConstant: number, period: number): { height: number; lag: number } {
	requirePositive({ timeConstant, period });
	const omega = (2 * Math.PI) / period;
	return {
		height: 1 / Math.hypot(1, omega * timeConstant),
		lag: Math.atan(omega * timeConstant) / omega
	};
}

/** A body whose surroundings cool down after a stop, all above the air outside. */
export interface Soak {
	/** How much warmer than the air outside the surroundings are at the stop, K. */
	surroundingsK: number;
	/** With which time constant they cool down. */
	surroundingsTime: number;
	/** How much warmer than the air outside the body is at the stop, K. */
	bodyK: number;
	/** With which it follows its surroundings, in the same unit. */
	bodyTime: number;
}

/**
 * The hottest that a body becomes after a stop, and when.
 *
 *     θ(t) = A (e^(−t/a) − e^(−t/b)) + θ0 e^(−t/b),   A = θs a/(a − b)      (a of the surroundings, b of the body)
 *     e^(t (1/b − 1/a)) = (a/b) (A − θ0)/A  at the peak
 *
 * @param soak excesses over the air outside in K at the stop, and time constants
 * @returns excess at the peak, K, and time after the stop in the unit of the time constants; at the stop itself when the
 *   body is no cooler than its surroundings
 * @throws EngineInputError when an excess is below zero, a time constant not above zero, or the two are the same
 * Validity: surroundings that cool down by one exponential and do not feel the body.
 * Source: closed form of the linear balance of one node.
 * @example
 * soakPeak({ surroundingsK: 55, surroundingsTime: 1.2, bodyK: 15, bodyTime: 4 }).excessK; // 19.904
 */
export function soakPeak({ surroundingsK, surroundingsTime, bodyK, bodyTime }: Soak): {
	excessK: number;
	time: number;
} {
	requireNotBelow(0, { surroundingsK, bodyK });
	requirePositive({ surroundingsTime, bodyTime });
	if (surroundingsTime === bodyTime) {
		throw new EngineInputError('bodyTime', bodyTime, `another than ${surroundingsTime}`);
	}
	if (bodyK >= surroundingsK) return { excessK: bodyK, time: 0 };
	const amplitude = (surroundingsK * surroundingsTime) / (surroundingsTime - bodyTime);
	const ratio = ((surroundingsTime / bodyTime) * (amplitude - bodyK)) / amplitude;
	const time = Math.log(ratio) / (1 / bodyTime - 1 / surroundingsTime);
	const [slow, quick] = [Math.exp(-time / surroundingsTime), Math.exp(-time / bodyTime)];
	return { excessK: amplitude * (slow - quick) + bodyK * quick, time };
}

/**
 * The two time constants of two bodies that exchange heat with one another, and each with the air.
 *
 *     τ = 2/[p ∓ √(p² − 4 q)],   p = (G + g1)/C1 + (G + g2)/C2,   q = (G g1 + G g2 + g1 g2)/(C1 C2)
 *
 * @param capacitiesJPerK heat capacities C1, C2, J/K
 * @param betweenWPerK G, W/K
 * @param toAirWPerK g1, g2, W/K; at least one above zero
 * @returns the longer and the shorter, s
 * @throws EngineInputError when a capacity or G is not above zero, a g below zero or both are zero
 * Validity: constant conductances.
 * Source: closed form: the eigenvalues of the two linear balances.
 * @example
 * twoBodyTimeConstantsS([10000, 12000], 5, [2, 0])[1]; // 965.02
 */
export function twoBodyTimeConstantsS(
	[capacity1JPerK, capacity2JPerK]: readonly [number, number],
	betweenWPerK: number,
	[toAir1WPerK, toAir2WPerK]: readonly [number, number]
): [longS: number, shortS: number] {
	requirePositive({ capacity1JPerK, capacity2JPerK, betweenWPerK });
	requireNotBelow(0, { toAir1WPerK, toAir2WPerK });
	requirePositive({ toAirWPerK: toAir1WPerK + toAir2WPerK });
	const p = (betweenWPerK + toAir1WPerK) / capacity1JPerK + (betweenWPerK + toAir2WPerK) / capacity2JPerK;
	const q =
		(betweenWPerK * (toAir1WPerK + toAir2WPerK) + toAir1WPerK * toAir2WPerK) /
		(capacity1JPerK * capacity2JPerK);
	const quickPerS = (p + Math.sqrt(p ** 2 - 4 * q)) / 2;
	// The product of the two rates is q: no digits cancel in the slow one.
	return [quickPerS / q, 1 / quickPerS];
}
