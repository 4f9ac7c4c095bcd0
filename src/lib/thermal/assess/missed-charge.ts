import type { Leg, MinuteSeries, Scenario } from '../types';
import { planChargeSpan } from '../vehicle/charge';

const MINUTES_PER_H = 60;
/** From here on a battery counts as full. */
const FULL_SOC = 0.99;

export interface MissedCharge {
	chargeMissedAh: number;
	chargeMissedHours: number;
}

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
 * What the battery would have taken while heat kept the charge latch open.
 *
 * The engine's own count goes on refusing at the state of charge at which the latch opened; here the battery that would
 * have been charged fills up and tapers, so that nothing is missed that it could not have held.
 */
export function countMissedCharge(scenario: Scenario, minutes: MinuteSeries): MissedCharge {
	const legs = spreadLegs(scenario.legs, minutes.count);
	let missedAh = 0;
	let missedMinutes = 0;
	let spanAh = 0;
	// The last grid point has no minute after it.
	for (let minute = 0; minute + 1 < minutes.count; minute++) {
		if (minutes.chargeOpen[minute] === 0) {
			spanAh = 0;
			continue;
		}
		const soc = Math.min(minutes.soc[minute]! + spanAh / scenario.battery.capacityAh, 1);
		const { currentA } = planChargeSpan(scenario, legs[minute]!, soc, {
			chargeOpen: false,
			dischargeOpen: true
		});
		if (currentA <= 0) continue;
		spanAh += currentA / MINUTES_PER_H;
		missedAh += currentA / MINUTES_PER_H;
		if (soc < FULL_SOC) missedMinutes++;
	}
	return { chargeMissedAh: missedAh, chargeMissedHours: missedMinutes / MINUTES_PER_H };
}
