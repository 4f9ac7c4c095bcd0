import { formatAmpHours, formatKelvin, formatTemperature } from './numbers';
import { formatClockHour, formatHours, sayHours } from './time';
import { formatVerdict, type Verdict } from './verdict';

/** What the sentence needs of an assessment; hours run on past 24. */
export interface VerdictFacts {
	verdict: Verdict;
	cutAtHour: number | null;
	resetAtHour: number | null;
	backByItself: boolean;
	darkHours: number;
	headroomK: number;
	peakCellsC: number;
	peakAtHour: number;
	chargeMissedAh: number;
	chargeMissedHours: number;
	/** When the day reaches camp, if it does. */
	campHour?: number | null;
}

export interface VerdictWords {
	headline: string;
	sentence: string;
}

/** The workshop hears temperatures; the customer hears what happens. */
export type Audience = 'workshop' | 'customer';

const A_MOMENT_H = 8 / 60;

/** "two hours before camp", "just as camp is reached", "half an hour after reaching camp". */
function sayAgainstCamp(hour: number, campHour: number): string {
	const hoursAfter = hour - campHour;
	if (Math.abs(hoursAfter) < A_MOMENT_H) return 'just as camp is reached';
	return hoursAfter < 0
		? `${sayHours(-hoursAfter)} before camp`
		: `${sayHours(hoursAfter)} after reaching camp`;
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

function sayStaysOn(facts: VerdictFacts, audience: Audience): string {
	const { verdict, headroomK, peakCellsC, peakAtHour } = facts;
	const isClose = verdict === 'runs-close';
	const at = formatClockHour(peakAtHour);
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

/** The verdict in one word of ours, and in one or two sentences of what happens to the person. */
export function describeVerdict(facts: VerdictFacts, audience: Audience = 'workshop'): VerdictWords {
	const happens = facts.verdict === 'cuts-out' ? sayCutOut(facts) : sayStaysOn(facts, audience);
	return { headline: formatVerdict(facts.verdict), sentence: happens + sayChargeMissed(facts, audience) };
}
