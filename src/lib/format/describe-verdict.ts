import { describeHeat } from './describe-heat';
import { formatAmpHours, formatKelvin, formatTemperature } from './numbers';
import { A_MOMENT_H, formatClockHour, formatHours, sayAgainstCamp, sayHours } from './time';
import { CLOSE_HEADROOM_K } from '../thermal/assess';
import { formatVerdict } from './verdict';
import type { Audience, VerdictFacts } from './verdict-facts';

export type { Audience, VerdictFacts };

export interface VerdictWords {
	headline: string;
	sentence: string;
}

/** How it ends: nothing is promised that the day's plan does not show. */
function sayReturn({ cutAtHour, resetAtHour, backByItself, darkHours }: VerdictFacts): string {
	if (resetAtHour === null || cutAtHour === null) return 'and is still dark when the plan ends';
	const isDarkAgain = !backByItself || darkHours > resetAtHour - cutAtHour + A_MOMENT_H;
	const back = `and comes back by itself at ${formatClockHour(resetAtHour)}`;
	return isDarkAgain ? `${back}, then goes dark again: ${formatHours(darkHours)} in all` : back;
}

function sayCutOut(facts: VerdictFacts): string {
	const { cutAtHour, campHour } = facts;
	if (cutAtHour === null) return 'The battery gets too hot on this day, and the fridge goes dark.';
	const camp = campHour === null || campHour === undefined ? '' : `, ${sayAgainstCamp(cutAtHour, campHour)}`;
	const ending = sayReturn(facts);
	return `The fridge goes dark at ${formatClockHour(cutAtHour)}${camp}${camp ? ',' : ''} ${ending}.`;
}

function sayKeptFromCharge({ headroomK, peakCellsC, peakAtHour }: VerdictFacts, audience: Audience): string {
	const stays = 'The fridge stays on all day, but the heat keeps the battery from charging as it should';
	if (audience === 'customer') return `${stays}.`;
	const peak = `${formatTemperature(peakCellsC)} at ${formatClockHour(peakAtHour)}`;
	return `${stays}. The cells are hottest with ${peak}, ${formatKelvin(headroomK)} short of going dark.`;
}

function sayStaysOn(facts: VerdictFacts, audience: Audience): string {
	const { verdict, headroomK, peakCellsC, peakAtHour } = facts;
	const isClose = verdict === 'runs-close';
	const at = formatClockHour(peakAtHour);
	// Far from its cut-off, what makes it close is the charge that heat keeps from it.
	if (isClose && headroomK >= CLOSE_HEADROOM_K) return sayKeptFromCharge(facts, audience);
	if (audience === 'customer') {
		return isClose
			? `The fridge stays on, but only just: at ${at} the battery is close to switching itself off.`
			: `The fridge stays on all day. The battery is at its hottest at ${at}, with room to spare.`;
	}
	const peak = formatTemperature(peakCellsC);
	const room = `${formatKelvin(headroomK)} short of going dark`;
	return isClose
		? `The fridge stays on, but only just: at ${at} the cells reach ${peak}, ${room}.`
		: `The fridge stays on all day. The cells are hottest at ${at}: ${peak}, ${room}.`;
}

function sayChargeMissed({ chargeMissedAh, chargeMissedHours }: VerdictFacts, audience: Audience): string {
	if (chargeMissedHours < A_MOMENT_H) return '';
	const length = sayHours(chargeMissedHours);
	if (audience === 'customer') return ` For ${length} it is too hot to charge, so it reaches camp less full.`;
	return ` Heat stops the charging for ${length}: ${formatAmpHours(chargeMissedAh)} missed.`;
}

function describeDark(facts: VerdictFacts, audience: Audience): string {
	const happens = facts.verdict === 'cuts-out' ? sayCutOut(facts) : sayStaysOn(facts, audience);
	return happens + sayChargeMissed(facts, audience);
}

/** The verdict in one word of ours, and in one or two sentences of what happens to the person. */
export function describeVerdict(
	facts: VerdictFacts & { chemistry?: string },
	audience: Audience = 'workshop'
): VerdictWords {
	const { leadAcid, verdict, chemistry } = facts;
	const sentence = leadAcid ? describeHeat({ ...facts, leadAcid }, audience) : describeDark(facts, audience);
	return { headline: formatVerdict(verdict, chemistry), sentence };
}
