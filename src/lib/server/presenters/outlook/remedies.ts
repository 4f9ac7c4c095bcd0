import { joinWords } from '$lib/format/join-words';
import { formatKelvin, formatMoney, formatNumber } from '$lib/format/numbers';
import { formatHours } from '$lib/format/time';
import type { RemedyLine, RemedyReport } from '$lib/schemas/outlook-reports';
import { REMEDIES, type RemedySearch, type RemedySet } from '$lib/thermal/outlook';
import { sayOfTwenty, small, type EventWords } from '$lib/format/outlook-words';

/** Less than this is neither cooler nor hotter. */
const LEAST_K = 0.05;

const byKey = new Map(REMEDIES.map((remedy) => [remedy.key, remedy]));
const labelOf = (key: string): string => byKey.get(key)?.label ?? key;

export function sayGain(gainK: number): string {
	if (Math.abs(gainK) < LEAST_K) return 'no gain';
	return `${formatKelvin(Math.abs(gainK))} ${gainK > 0 ? 'cooler' : 'hotter'}`;
}

const sayWork = (hours: number): string => (hours > 0 ? formatHours(hours) : 'none');
const sayParts = (cost: number): string => (cost > 0 ? formatMoney(cost) : 'none');

/** "Reflective wrap and fresh-air duct", as a sentence begins. */
function nameSet({ keys }: RemedySet): string {
	return joinWords(keys.map((key, at) => (at === 0 ? labelOf(key) : small(labelOf(key)))));
}

function presentSet(
	set: RemedySet,
	least: RemedySet | null,
	{ adjective, sayVerdict }: EventWords
): RemedyLine {
	const { keys, cost, hours, gainK, verdict, cutOutShare } = set;
	return {
		label: nameSet(set),
		effect: keys.map((key) => byKey.get(key)?.effect ?? '').join(' '),
		gain: sayGain(gainK),
		parts: sayParts(cost),
		work: sayWork(hours),
		verdict: sayVerdict(verdict),
		chance: cutOutShare === null ? '' : `${adjective} on ${sayOfTwenty(cutOutShare)}`,
		isLeast: least !== null && least.keys.join() === keys.join()
	};
}

/** What a set costs with its work, in round figures of the workshop's money; a few coins are not rounded to nothing. */
export function sumMoney({ cost, hours }: RemedySet, moneyPerHour: number): number {
	const money = cost + hours * moneyPerHour;
	return money < 10 ? money : Math.round(money / 10) * 10;
}

export const nameRemedies = (set: RemedySet): string => small(nameSet(set));

function sayCost(set: RemedySet, moneyPerHour: number): string {
	const money = sumMoney(set, moneyPerHour);
	if (money === 0) return 'and costs nothing';
	return `parts ${sayParts(set.cost)}, work ${sayWork(set.hours)}, together about ${formatMoney(money)}`;
}

function sayLeast(search: RemedySearch, { adjective, sayVerdict }: EventWords): string {
	const { least, front, mostCutOutShare, moneyPerHour, asPlanned } = search;
	const bar = `“rides it out”, ${adjective} on at most ${formatNumber(20 * mostCutOutShare)} of 20 days like this`;
	if (least === null) {
		const coolest = front.at(-1);
		const best = coolest
			? ` The coolest of them: ${small(nameSet(coolest))}, ${sayGain(coolest.gainK)}; with that it still ${sayVerdict(coolest.verdict)}${coolest.cutOutShare === null ? '' : `, ${adjective} on ${sayOfTwenty(coolest.cutOutShare)}`}.`
			: '';
		return `Nothing that was tried brings it to ${bar}.${best} Look at another position.`;
	}
	if (least.keys.length === 0) {
		return `Nothing more is needed: as planned it rides the day out, ${adjective} on ${sayOfTwenty(asPlanned.cutOutShare ?? 0)} days like this.`;
	}
	const already =
		asPlanned.verdict === 'rides-it-out'
			? `As planned it rides the day out, but is ${adjective} on ${sayOfTwenty(asPlanned.cutOutShare ?? 0)} days like it. `
			: '';
	return `${already}The least that brings it to ${bar}: ${small(nameSet(least))}. That is ${sayGain(least.gainK)}, ${sayCost(least, moneyPerHour)}; ${adjective} on ${sayOfTwenty(least.cutOutShare ?? 0)}.`;
}

function sayHotter(alone: readonly RemedySet[]): string {
	const hotter = alone.filter(({ gainK }) => gainK <= -LEAST_K);
	if (hotter.length === 0) return '';
	const named = hotter.map((set) => `${small(nameSet(set))} (${sayGain(set.gainK)})`);
	return `Do not do this here, it makes the battery hotter: ${joinWords(named)}.`;
}

/** What it would take, from the workshop's own list. */
export function presentRemedies(search: RemedySearch, words: EventWords): RemedyReport {
	const { alone, front, least, notTried, tried, moneyPerHour } = search;
	return {
		sentence: sayLeast(search, words),
		alone: alone.map((set) => presentSet(set, least, words)),
		hotter: sayHotter(alone),
		front: front.map((set) => presentSet(set, least, words)),
		notTried,
		method: `${tried} sets of remedies were each run on the planned day. Money is the workshop’s own; an hour of work counts as ${formatMoney(moneyPerHour)}. What a remedy does is mostly judgement, and said beside it.`
	};
}
