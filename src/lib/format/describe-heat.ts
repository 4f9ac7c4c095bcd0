import { CLOSE_HEADROOM_K } from '../thermal/assess';
import type { LeadAcidFigures } from '../thermal/assess/types';
import { formatKelvin, formatTemperature } from './numbers';
import { A_MOMENT_H, formatClockHour, formatHours, sayAgainstCamp, sayHours } from './time';
import type { Audience, VerdictFacts } from './verdict-facts';

/** Of a battery that nothing switches off. */
export type HeatFacts = VerdictFacts & { leadAcid: LeadAcidFigures };

function sayTooHot({ leadAcid, campHour, peakCellsC, peakAtHour }: HeatFacts, audience: Audience): string {
	const { tooHotAtHour, hoursAboveUseLimit, useLimitC } = leadAcid;
	const at = tooHotAtHour ?? peakAtHour;
	const camp = campHour === null || campHour === undefined ? '' : `, ${sayAgainstCamp(at, campHour)}`;
	const since = `From ${formatClockHour(at)}${camp}, the battery is hotter than`;
	const length = hoursAboveUseLimit < A_MOMENT_H ? '' : `, for ${formatHours(hoursAboveUseLimit)} in all`;
	if (audience === 'customer') {
		return `${since} its maker allows${length}. Nothing switches it off: the fridge stays on, and the battery takes harm.`;
	}
	const limit = formatTemperature(useLimitC);
	const peak = `${formatTemperature(peakCellsC)} at ${formatClockHour(peakAtHour)}`;
	return `${since} the ${limit} that it may have in use${length}. Nothing switches it off: the cells reach ${peak}.`;
}

function sayBearsIt({ leadAcid, verdict, ...facts }: HeatFacts, audience: Audience): string {
	const { headroomK, peakCellsC, peakAtHour } = facts;
	const at = formatClockHour(peakAtHour);
	const isClose = verdict === 'runs-close';
	if (audience === 'customer') {
		return isClose
			? `The fridge stays on, but the battery comes close to its limits: it is at its hottest at ${at}.`
			: `The fridge stays on all day. The battery is at its hottest at ${at}, with room to spare.`;
	}
	const limit = formatTemperature(leadAcid.useLimitC);
	const peak = `at ${at} the cells reach ${formatTemperature(peakCellsC)}, ${formatKelvin(headroomK)} short of the ${limit} that it may have in use`;
	return isClose && headroomK < CLOSE_HEADROOM_K
		? `The battery bears the day, but only just: ${peak}.`
		: `The battery bears the day: ${peak}.`;
}

function sayChargedHot({ leadAcid }: HeatFacts, audience: Audience): string {
	const { hoursAboveChargeLimit, chargeLimitC, peakChargingC } = leadAcid;
	if (hoursAboveChargeLimit === 0 || peakChargingC === null) return '';
	if (audience === 'customer') {
		return ` For ${sayHours(hoursAboveChargeLimit)} it is charged hotter than its maker allows, which wears it and makes gas.`;
	}
	return ` For ${formatHours(hoursAboveChargeLimit)} it is charged above ${formatTemperature(chargeLimitC)}, at up to ${formatTemperature(peakChargingC)}.`;
}

/** What happens to a battery that nothing switches off, and to whoever depends on it. */
export function describeHeat(facts: HeatFacts, audience: Audience): string {
	const happens = facts.verdict === 'cuts-out' ? sayTooHot(facts, audience) : sayBearsIt(facts, audience);
	return happens + sayChargedHot(facts, audience);
}
