import type { HeatLimits } from '../chemistries/guard';
import type { Scenario } from '../types';
import type { Outcome } from '../vehicle/outcome-run';
import type { MountVerdict } from './types';

/** Less room than this below the cut-off is called close: engineering judgement, about what the coefficients can be off by. */
export const CLOSE_HEADROOM_K = 5;
/** Charge missed to heat counts from this share of the capacity. */
export const MISSED_SHARE_THAT_COUNTS = 0.01;

/**
 * The verdict on a battery that nothing switches off.
 *
 * The key of "cuts out": the cells pass the limit of use. Runs close: less than 5 K below it, or charged above the limit
 * of charging. Otherwise it rides the day out.
 */
export function judgeHeat({ chargedTooHot }: { chargedTooHot: boolean }, headroomK: number): MountVerdict {
	if (headroomK < 0) return 'cuts-out';
	return headroomK < CLOSE_HEADROOM_K || chargedTooHot ? 'runs-close' : 'rides-it-out';
}

/**
 * What a run means in one of three words.
 *
 * @param scenario the day, the limit of use in the place of the cut-off where nothing switches the battery off
 * @param outcome of its run
 * @param limits of a battery that nothing switches off
 * @returns the verdict, by the same rules as an assessment
 * Validity: as the run.
 * Source: our own rules.
 * @example
 * const outcome = { cutsOut: true, peakSensorC: 70, missedAh: 0, peakChargingC: 40 };
 * judgeOutcome(defaultScenario([{ minutes: 60 }]), outcome, null); // 'cuts-out'
 */
export function judgeOutcome(
	{ battery, bms }: Scenario,
	outcome: Pick<Outcome, 'cutsOut' | 'peakSensorC' | 'missedAh' | 'peakChargingC'>,
	limits: HeatLimits | null
): MountVerdict {
	const headroomK = bms.discharge.cut - outcome.peakSensorC;
	if (limits) return judgeHeat({ chargedTooHot: outcome.peakChargingC > limits.highestChargeC }, headroomK);
	if (outcome.cutsOut) return 'cuts-out';
	const missedChargeCounts = outcome.missedAh >= MISSED_SHARE_THAT_COUNTS * battery.capacityAh;
	return headroomK < CLOSE_HEADROOM_K || missedChargeCounts ? 'runs-close' : 'rides-it-out';
}
