import type { Scenario } from '../types';
import type { Outcome } from '../vehicle/outcome-run';
import type { MountVerdict } from './types';

/** Less room than this below the cut-off is called close: engineering judgement, about what the coefficients can be off by. */
export const CLOSE_HEADROOM_K = 5;
/** Charge missed to heat counts from this share of the capacity. */
export const MISSED_SHARE_THAT_COUNTS = 0.01;

/** What a run means in one of three words. */
export function judgeOutcome(
	{ battery, bms }: Scenario,
	outcome: Omit<Outcome, 'darkHours' | 'events'>
): MountVerdict {
	if (outcome.cutsOut) return 'cuts-out';
	const headroomK = bms.discharge.cut - outcome.peakSensorC;
	const missedChargeCounts = outcome.missedAh >= MISSED_SHARE_THAT_COUNTS * battery.capacityAh;
	return headroomK < CLOSE_HEADROOM_K || missedChargeCounts ? 'runs-close' : 'rides-it-out';
}
