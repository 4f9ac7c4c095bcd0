import { guardOf, type HeatFields, type HeatGuard } from '../thermal/chemistries';
import { formatTemperature } from './numbers';

/** What a picture of the day draws of a battery that switches itself off. */
export interface CutOffLimits {
	dischargeCutC: number;
	dischargeResetC: number;
	chargeCutC: number;
	chargeResetC: number;
	sensor: Extract<HeatGuard, { kind: 'cut-offs' }>['sensor'];
}
/** The same of one that nothing switches off. */
export interface UseLimits {
	highestUseC: number;
	highestChargeC: number;
}
export type DayLimits = CutOffLimits | UseLimits;

export const isUseLimits = (limits: DayLimits): limits is UseLimits => 'highestUseC' in limits;

/** The limits of a battery that belong into a picture of its day. */
export function dayLimitsOf(battery: HeatFields): DayLimits {
	const guard = guardOf(battery);
	if (guard.kind === 'heat-limits') {
		const { highestUseC, highestChargeC } = guard;
		return { highestUseC, highestChargeC };
	}
	const { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC, sensor } = guard;
	return { dischargeCutC, dischargeResetC, chargeCutC, chargeResetC, sensor };
}

/** "goes dark at 75 °C", "may be used up to 60 °C". */
export function sayUseLimit(battery: HeatFields): string {
	const limits = dayLimitsOf(battery);
	return isUseLimits(limits)
		? `may be used up to ${formatTemperature(limits.highestUseC)}`
		: `goes dark at ${formatTemperature(limits.dischargeCutC)}`;
}

/** "goes dark at 75 °C, comes back at 62 °C", "may be used up to 60 °C, charged up to 50 °C". */
export function sayHeatLimits(battery: HeatFields): string {
	const limits = dayLimitsOf(battery);
	const second = isUseLimits(limits)
		? `charged up to ${formatTemperature(limits.highestChargeC)}`
		: `comes back at ${formatTemperature(limits.dischargeResetC)}`;
	return `${sayUseLimit(battery)}, ${second}`;
}
