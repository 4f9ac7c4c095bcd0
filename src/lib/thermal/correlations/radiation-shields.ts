import { exchangeFactorParallel, KELVIN_AT_ZERO_C, STEFAN_BOLTZMANN } from './radiation';
import { requireNotBelow } from './require';

/** A plane that radiates: its temperature and how well it emits. */
export interface RadiatingPlane {
	tempC: number;
	emissivity: number;
}

/** Emissivities of the two faces of a shield: the one towards the hot plane first. */
export type ShieldFaces = readonly [number, number];

const fourthPower = (tempC: number): number => (tempC + KELVIN_AT_ZERO_C) ** 4;

/**
 * Temperatures at which shields between two parallel planes settle when nothing but radiation reaches them.
 *
 *     Ts⁴ = T1⁴ − q/(σ Es),   Es the exchange factor from plane 1 to the near face of the shield,   q = E σ (T1⁴ − T2⁴)
 *
 * @param hot plane 1: temperature in °C and emissivity
 * @param cold plane 2
 * @param shields from plane 1 to plane 2, the emissivities of both faces of each
 * @returns one temperature for each shield, °C
 * @throws EngineInputError when an emissivity is not within 0 < ε ≤ 1 or a temperature lies below absolute zero
 * Validity: grey planes so near that nothing escapes at the edges; shields that neither conduct along nor meet air.
 * Source: Incropera, DeWitt, Bergman, Lavine, Fundamentals of Heat and Mass Transfer, 6th ed., section 13.3.4 (eq. 13.28).
 * @example
 * floatingShieldTempsC({ tempC: 500, emissivity: 0.8 }, { tempC: 60, emissivity: 0.9 }, [[0.05, 0.05]])[0]; // 381.99
 */
export function floatingShieldTempsC(
	hot: RadiatingPlane,
	cold: RadiatingPlane,
	shields: readonly ShieldFaces[]
): number[] {
	requireNotBelow(-KELVIN_AT_ZERO_C, { hotC: hot.tempC, coldC: cold.tempC });
	const whole = exchangeFactorParallel(hot.emissivity, cold.emissivity, shields);
	const flux = whole * (fourthPower(hot.tempC) - fourthPower(cold.tempC));
	return shields.map(([front], at) => {
		const upToHere = exchangeFactorParallel(hot.emissivity, front, shields.slice(0, at));
		return (fourthPower(hot.tempC) - flux / upToHere) ** 0.25 - KELVIN_AT_ZERO_C;
	});
}

/**
 * The temperature at which radiation and films carry a given heat together.
 *
 *     a T⁴ + b T = c      (T in kelvin)
 *
 * Newton's steps from above: the curve is convex and rises, so that each step stays above the root and falls towards it.
 */
function solveRadiantBalance(a: number, b: number, c: number, aboveK: number): number {
	let kelvin = aboveK;
	for (;;) {
		const next = kelvin - (a * kelvin ** 4 + b * kelvin - c) / (4 * a * kelvin ** 3 + b);
		if (!(next < kelvin)) return kelvin;
		kelvin = next;
	}
}

/** A shield in moving air: its faces, the films on them and the air on each side. */
export interface AiredShield {
	faces: ShieldFaces;
	/** Film on the hot and on the cold side, W/m²K. */
	filmsWPerM2K: readonly [number, number];
	/** Air on the hot and on the cold side, °C. */
	airC: readonly [number, number];
}

/** What an aired shield comes to, each flux in W/m². */
export interface ShieldBalance {
	shieldC: number;
	fromHotWPerM2: number;
	toColdWPerM2: number;
	toAirWPerM2: number;
}

/**
 * Temperature of a shield that radiates on both sides and is cooled (or warmed) by air on both.
 *
 *     E1 σ (T1⁴ − Ts⁴) = E2 σ (Ts⁴ − T2⁴) + h1 (Ts − Tair1) + h2 (Ts − Tair2)
 *
 * @param hot plane 1: temperature in °C and emissivity
 * @param cold plane 2
 * @param shield emissivities of its faces, films in W/m²K and air in °C, the hot side first
 * @returns the shield's temperature in °C, and what reaches it, passes on to plane 2 and goes to the air, W/m²
 * @throws EngineInputError when an emissivity is not within 0 < ε ≤ 1, a temperature lies below absolute zero or a film below zero
 * Validity: grey planes so near that nothing escapes at the edges; a thin shield of one temperature; air of given temperature.
 * Source: Incropera et al., 6th ed., eq. 13.24 on each side, with Newton's law of cooling (eq. 1.3a).
 * @example
 * balanceAiredShield({ tempC: 500, emissivity: 0.8 }, { tempC: 60, emissivity: 0.9 }, { faces: [0.3, 0.3], filmsWPerM2K: [8, 8], airC: [80, 80] }).shieldC; // 270.19
 */
export function balanceAiredShield(
	hot: RadiatingPlane,
	cold: RadiatingPlane,
	{ faces: [front, back], filmsWPerM2K: [film1, film2], airC: [air1, air2] }: AiredShield
): ShieldBalance {
	requireNotBelow(-KELVIN_AT_ZERO_C, { hotC: hot.tempC, coldC: cold.tempC, air1C: air1, air2C: air2 });
	requireNotBelow(0, { film1WPerM2K: film1, film2WPerM2K: film2 });
	const before = STEFAN_BOLTZMANN * exchangeFactorParallel(hot.emissivity, front);
	const behind = STEFAN_BOLTZMANN * exchangeFactorParallel(back, cold.emissivity);
	const gained =
		before * fourthPower(hot.tempC) +
		behind * fourthPower(cold.tempC) +
		film1 * (air1 + KELVIN_AT_ZERO_C) +
		film2 * (air2 + KELVIN_AT_ZERO_C);
	const warmestK = Math.max(hot.tempC, cold.tempC, air1, air2) + KELVIN_AT_ZERO_C;
	const shieldC = solveRadiantBalance(before + behind, film1 + film2, gained, warmestK) - KELVIN_AT_ZERO_C;
	return {
		shieldC,
		fromHotWPerM2: before * (fourthPower(hot.tempC) - fourthPower(shieldC)),
		toColdWPerM2: behind * (fourthPower(shieldC) - fourthPower(cold.tempC)),
		toAirWPerM2: film1 * (shieldC - air1) + film2 * (shieldC - air2)
	};
}
