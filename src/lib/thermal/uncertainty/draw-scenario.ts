import { expOf } from '../solve/elementary';
import { normalQuantile } from '../statistics';
import type { Scenario } from '../types';
import { PRIORS, type Prior, type Spread } from './priors';

/**
 * A copy whose groups and legs may be changed.
 *
 * @param scenario whole scenario; not changed
 * @returns one with groups and legs of its own
 * Validity: every scenario that parseScenario made.
 * Source: our own.
 * @example
 * copyScenario(defaultScenario([{ minutes: 60 }])).legs.length; // 1
 */
export function copyScenario(scenario: Scenario): Scenario {
	const { shield, bms, measured } = scenario;
	return {
		vehicle: { ...scenario.vehicle },
		engine: { ...scenario.engine },
		exhaust: { ...scenario.exhaust },
		bay: { ...scenario.bay },
		bonnet: { ...scenario.bonnet },
		enclosure: { ...scenario.enclosure },
		position: { ...scenario.position },
		shield: shield && { ...shield },
		tray: { ...scenario.tray },
		battery: { ...scenario.battery },
		bms: { ...bms, charge: { ...bms.charge }, discharge: { ...bms.discharge } },
		charger: { ...scenario.charger },
		climate: { ...scenario.climate },
		start: { ...scenario.start },
		legs: scenario.legs.map((leg) => ({ ...leg })),
		...(measured ? { measured } : {})
	};
}

/**
 * A value moved by z standard deviations of its spread.
 *
 *     shift: v + σz,  factor: v e^(σz),  share: v/(v + (1 − v) e^(−σz))
 *
 * @param spread its kind and σ
 * @param z standard normal number
 * @param value as estimated
 * @returns the moved value; a share of 0 or 1 stays what it is
 * Validity: all numbers; shares within 0…1.
 * Source: definitions of a normal, a lognormal and a logit-normal spread.
 * @example
 * moveBy({ kind: 'factor', sigma: 0.5 }, 2, 10); // 27.183
 */
export function moveBy({ kind, sigma }: Spread, z: number, value: number): number {
	if (kind === 'shift') return value + sigma * z;
	if (kind === 'factor') return value * expOf(sigma * z);
	if (value <= 0 || value >= 1) return value;
	return value / (value + (1 - value) * expOf(-sigma * z));
}

/**
 * One vehicle, mount and day as they may really be.
 *
 *     factor: v e^(σz),  shift: v + σz,  share: 1/(1 + (1/v − 1) e^(−σz));   z = Φ⁻¹(u)
 *
 * @param scenario as it was estimated; not changed
 * @param point one coordinate a prior, above 0 and below 1, in the order of `priors`
 * @param priors those that are drawn; the others stay as they are
 * @returns a scenario of its own
 * Validity: independent unknowns.
 * Source: the priors say what theirs is.
 * @example
 * drawScenario(defaultScenario([{ minutes: 60 }]), PRIORS.map(() => 0.5)).bay.leakClosed; // 20
 */
export function drawScenario(
	scenario: Scenario,
	point: readonly number[],
	priors: readonly Prior[] = PRIORS
): Scenario {
	const drawn = copyScenario(scenario);
	for (let k = 0; k < priors.length; k++) {
		const { spread, apply } = priors[k]!;
		const z = normalQuantile(point[k]!);
		apply(drawn, (value) => moveBy(spread, z, value));
	}
	return drawn;
}
