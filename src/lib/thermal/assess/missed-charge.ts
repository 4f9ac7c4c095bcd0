import type { Leg, MinuteSeries, Scenario } from '../types';
import { fillUp } from '../vehicle/charge';

const MINUTES_PER_H = 60;
const S_PER_MIN = 60;
/** From here on a battery counts as full. */
const FULL_SOC = 0.99;

/** The leg that runs at each minute of the grid. */
function spreadLegs(legs: readonly Leg[], count: number): Leg[] {
	let at = 0;
	let endMin = legs[0]!.minutes;
	return Array.from({ length: count }, (_, minute) => {
		while (minute >= endMin && at + 1 < legs.length) endMin += legs[++at]!.minutes;
		return legs[at]!;
	});
}

/**
 * How long a battery that was not full yet went without the charge that heat kept from it, h.
 *
 * The battery that would have been charged fills up and tapers meanwhile; once it would have been full nothing is missed.
 */
export function countMissedHours(scenario: Scenario, minutes: MinuteSeries): number {
	const legs = spreadLegs(scenario.legs, minutes.count);
	let missedMinutes = 0;
	let missedSoc = 0;
	// The last grid point has no minute after it.
	for (let minute = 0; minute + 1 < minutes.count; minute++) {
		if (minutes.chargeOpen[minute] === 0) {
			missedSoc = 0;
			continue;
		}
		const soc = Math.min(minutes.soc[minute]! + missedSoc, 1);
		const gained = fillUp(scenario, legs[minute]!, soc, S_PER_MIN) - soc;
		missedSoc += gained;
		if (gained > 0 && soc < FULL_SOC) missedMinutes++;
	}
	return missedMinutes / MINUTES_PER_H;
}
