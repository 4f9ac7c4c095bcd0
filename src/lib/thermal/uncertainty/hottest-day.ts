import type { Scenario } from '../types';
import type { OutcomeRunner } from '../vehicle/outcome-run';
import { copyScenario } from './draw-scenario';

/** Daily maxima between which the limit is looked for, °C. */
export const COOLEST_TRIED_C = 8;
export const HOTTEST_TRIED_C = 56;

/**
 * The hottest day that a scenario bears: the daily maximum at which `bears` comes to fail, by halving.
 *
 * @param scenario whole scenario; only its climate's tMax is changed
 * @param runner runs the days
 * @param bears whether a day is borne, from the outcome of its run
 * @param withinK how exactly the limit is found, K
 * @returns the limit in °C; −Infinity when not even the coolest day tried is borne, Infinity when all are
 * Validity: a hotter day is not borne better, which holds for this model to a few tenths of a kelvin.
 * Source: bisection.
 * @example
 * const bears = ({ peakSensorC }) => peakSensorC < 40;
 * findHottestDay(defaultScenario([{ minutes: 60 }]), new OutcomeRunner(), bears, 0.5) > 8; // true
 */
export function findHottestDay(
	scenario: Scenario,
	runner: OutcomeRunner,
	bears: (outcome: ReturnType<OutcomeRunner['run']>, scenario: Scenario) => boolean,
	withinK: number
): number {
	const tried = copyScenario(scenario);
	const bearsAt = (tMax: number): boolean => {
		tried.climate.tMax = tMax;
		return bears(runner.run(tried), tried);
	};
	let low = COOLEST_TRIED_C;
	let high = HOTTEST_TRIED_C;
	if (!bearsAt(low)) return -Infinity;
	if (bearsAt(high)) return Infinity;
	while (high - low > withinK) {
		const middle = (low + high) / 2;
		if (bearsAt(middle)) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
