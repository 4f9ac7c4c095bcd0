import type { HeatLimits } from '../chemistries/guard';
import type { Scenario } from '../types';
import { copyScenario, drawScenario } from '../uncertainty/draw-scenario';
import { partOf } from '../uncertainty/finish-work';
import { PRIORS } from '../uncertainty/priors';
import { scrambledSobolPoint } from '../statistics';
import { OutcomeRunner } from '../vehicle/outcome-run';
import { REMEDIES, type Remedy } from './remedies';
import type { MountVerdict } from './types';
import { judgeOutcome } from './verdict';

/** More than these together are not tried: the list grows fast, and nobody fits five. */
export const MOST_TOGETHER = 4;
/** What an hour of work counts as beside money, where the workshop has not said. */
export const USUAL_MONEY_PER_HOUR = 100;

/** Less than this is no gain. */
const LEAST_GAIN_K = 0.05;
/** Of so many sets that ride the planned day out, the cheapest, the chance is worked out. */
const MOST_CHANCES = 40;
const SAY_MOST_CHANCES = `The chance of more than the ${MOST_CHANCES} cheapest that ride the planned day out.`;
/** How much of the work the search is; the rest are the chances. */
const SEARCH_SHARE = 0.6;

/** What the workshop asks for a remedy; one that it does not offer is not tried. */
export interface RemedyOffer {
	key: string;
	cost: number;
	hours: number;
	offered: boolean;
}

/** Some remedies together, and what they come to on the planned day. */
export interface RemedySet {
	keys: string[];
	cost: number;
	hours: number;
	/** How much cooler what the BMS watches stays at its hottest, K. */
	gainK: number;
	headroomK: number;
	verdict: MountVerdict;
	/** Share of drawn days that end in the dark; null where it was not worked out. */
	cutOutShare: number | null;
}

export interface RemedySearch {
	/** What an hour of work counted as beside money. */
	moneyPerHour: number;
	/** Each remedy that fits, alone, by what it gains. */
	alone: RemedySet[];
	/** From the cheapest to the coolest: each is cooler than all that cost no more. */
	front: RemedySet[];
	/** The mount without any. */
	asPlanned: RemedySet;
	/** The cheapest that rides the day out with at most this share of dark days: no remedy where none is needed; null when none does. */
	least: RemedySet | null;
	mostCutOutShare: number;
	tried: number;
	/** What was not tried, in sentences. */
	notTried: string[];
}

export interface SearchOptions {
	offers?: readonly RemedyOffer[];
	moneyPerHour?: number;
	/** Draws for the chance of a set on the front. */
	samples: number;
	seed: number;
	/** The chance that is still called riding it out. */
	mostCutOutShare: number;
	/** How many are tried together. */
	together?: number;
	/** Of a battery that nothing switches off. */
	limits?: HeatLimits | null;
	/** The share of dark days without any remedy, where it was worked out with more draws already. */
	bareCutOutShare?: number;
}

type Offered = Remedy & { offered: boolean };

/**
 * The remedies with the workshop's own figures.
 *
 * @param offers money in the workshop's currency, hours, and whether it is offered, by key
 * @returns every remedy; one without an offer with its usual figures, and offered
 * Validity: offers of keys that are no remedy's are passed over.
 * Source: the workshop; the usual figures are judgement.
 * @example
 * priceRemedies([{ key: 'wrap', cost: 75, hours: 1, offered: true }])[0].cost; // 75
 */
export function priceRemedies(offers: readonly RemedyOffer[] = []): Offered[] {
	const byKey = new Map(offers.map((offer) => [offer.key, offer]));
	return REMEDIES.map((remedy) => {
		const { cost, hours, offered } = {
			cost: remedy.cost,
			hours: remedy.hours,
			offered: true,
			...byKey.get(remedy.key)
		};
		return { ...remedy, cost, hours, offered };
	});
}

function goTogether(remedies: readonly Remedy[], next: Remedy): boolean {
	if (next.group !== null && remedies.some(({ group }) => group === next.group)) return false;
	const all = [...remedies, next];
	// What is done about the bay does nothing for a battery that has left it.
	return (
		!all.some(({ group }) => group === 'place') ||
		all.every(({ group }) => group === 'place' || group === 'charge')
	);
}

/** Every set of up to so many that go together, the empty one left out. */
function listSets(remedies: readonly Remedy[], together: number): Remedy[][] {
	let last: Remedy[][] = [[]];
	const all: Remedy[][] = [];
	for (let size = 1; size <= together; size++) {
		last = last.flatMap((set) => {
			const from = set.length === 0 ? 0 : remedies.indexOf(set.at(-1)!) + 1;
			return remedies
				.slice(from)
				.filter((next) => goTogether(set, next))
				.map((next) => [...set, next]);
		});
		all.push(...last);
	}
	return all;
}

function applyAll(scenario: Scenario, set: readonly Remedy[]): Scenario {
	const changed = copyScenario(scenario);
	for (const { apply } of set) apply(changed);
	return changed;
}

function runSet(
	scenario: Scenario,
	set: readonly Remedy[],
	runner: OutcomeRunner,
	bareC: number,
	limits: HeatLimits | null
): RemedySet {
	const changed = applyAll(scenario, set);
	const outcome = runner.run(changed);
	return {
		keys: set.map(({ key }) => key),
		cost: set.reduce((sum, { cost }) => sum + cost, 0),
		hours: set.reduce((sum, { hours }) => sum + hours, 0),
		gainK: bareC - outcome.peakSensorC,
		headroomK: changed.bms.discharge.cut - outcome.peakSensorC,
		verdict: judgeOutcome(changed, outcome, limits),
		cutOutShare: null
	};
}

/** From the cheapest on, of equally cheap ones the coolest first. */
function sortByMoney(sets: readonly RemedySet[], moneyPerHour: number): RemedySet[] {
	const money = ({ cost, hours }: RemedySet): number => cost + hours * moneyPerHour;
	return [...sets].sort((a, b) => money(a) - money(b) || b.gainK - a.gainK);
}

/** The sets of which no other costs no more and gains more, from the cheapest on. */
function findFront(byMoney: readonly RemedySet[]): RemedySet[] {
	const front: RemedySet[] = [];
	for (const set of byMoney) {
		if (set.gainK > (front.at(-1)?.gainK ?? 0) + LEAST_GAIN_K) front.push(set);
	}
	return front;
}

function listNotTried(offered: readonly Offered[], scenario: Scenario, together: number): string[] {
	const withheld = offered.filter((remedy) => !remedy.offered).map(({ label }) => label);
	const unfit = offered
		.filter((remedy) => remedy.offered && !remedy.fits(scenario))
		.map(({ label }) => label);
	return [
		`More than ${together} together.`,
		...(withheld.length > 0 ? [`What the workshop does not offer: ${withheld.join(', ')}.`] : []),
		...(unfit.length > 0 ? [`What does not apply to this mount: ${unfit.join(', ')}.`] : []),
		'Positions other than the cargo area: each is a mount of its own, beside this one.'
	];
}

/** A charger that carries the loads alone does so whatever they draw. */
function keepAtRest({ legs, charger }: Scenario, drawn: Scenario): void {
	legs.forEach(({ loadA, engineOn }, at) => {
		if (engineOn && loadA === charger.maxA) drawn.legs[at]!.loadA = drawn.charger.maxA;
	});
}

/** The share of drawn days that end in the dark. */
function* findCutOutShare(
	scenario: Scenario,
	runner: OutcomeRunner,
	{ samples, seed }: SearchOptions
): Generator<void, number> {
	let cutOuts = 0;
	for (let draw = 0; draw < samples; draw++) {
		const drawn = drawScenario(scenario, scrambledSobolPoint(draw, PRIORS.length, seed));
		keepAtRest(scenario, drawn);
		if (runner.run(drawn).cutsOut) cutOuts++;
		yield;
	}
	return cutOuts / samples;
}

/**
 * What it would take: every set of up to four remedies that go together, run on the planned day.
 *
 *     front: no other set costs no more and gains more;   money = cost + hours · moneyPerHour
 *
 * @param scenario the day as it was estimated, without remedies
 * @param options the workshop's figures, draws and seed for the chances, the chance that is still accepted
 * @returns as a generator, yields the share of the work done; remedies alone, the front from cheapest to coolest, the
 *   cheapest that rides the day out with the accepted chance, and what was not tried
 * @throws RunFailedError when a set cannot be run to its end
 * Validity: the planned day; the chances as spreadDay. What a remedy does is said beside it and mostly judgement.
 * Source: exhaustive search.
 * @example
 * const work = searchRemedies(defaultScenario([{ minutes: 60 }]), { samples: 2, seed: 1, mostCutOutShare: 0.05 });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.least.keys.length; // 0
 */
export function* searchRemedies(scenario: Scenario, options: SearchOptions): Generator<number, RemedySearch> {
	const { offers, moneyPerHour = USUAL_MONEY_PER_HOUR, mostCutOutShare } = options;
	const { together = MOST_TOGETHER, limits = null, bareCutOutShare } = options;
	const runner = new OutcomeRunner();
	const bareC = runner.run(scenario).peakSensorC;
	const offered = priceRemedies(offers);
	const candidates = listSets(
		offered.filter((remedy) => remedy.offered && remedy.fits(scenario)),
		together
	);
	const asPlanned = runSet(scenario, [], runner, bareC, limits);
	const results = new Map<RemedySet, Remedy[]>([[asPlanned, []]]);
	for (const [at, set] of candidates.entries()) {
		results.set(runSet(scenario, set, runner, bareC, limits), set);
		yield (SEARCH_SHARE * (at + 1)) / candidates.length;
	}
	const alone = [...results].filter(([, set]) => set.length === 1).map(([result]) => result);
	const byMoney = sortByMoney([...results.keys()], moneyPerHour);
	const front = findFront(byMoney);
	// Where nothing is needed, nothing is asked for, not even what costs nothing.
	const inOrder = [asPlanned, ...byMoney.filter((set) => set !== asPlanned)];
	const rides = inOrder.filter(({ verdict }) => verdict === 'rides-it-out');
	let asked = 0;
	/** Works out the chance of a set once. */
	const askChance = function* (result: RemedySet): Generator<number, number> {
		if (result === asPlanned && bareCutOutShare !== undefined) result.cutOutShare = bareCutOutShare;
		if (result.cutOutShare === null) {
			const progress = SEARCH_SHARE + (1 - SEARCH_SHARE) * Math.min(++asked / MOST_CHANCES, 1);
			const changed = applyAll(scenario, results.get(result)!);
			result.cutOutShare = yield* partOf(findCutOutShare(changed, runner, options), () => progress);
		}
		return result.cutOutShare;
	};
	yield* askChance(asPlanned);
	let least: RemedySet | null = null;
	for (const result of rides.slice(0, MOST_CHANCES)) {
		if ((yield* askChance(result)) > mostCutOutShare) continue;
		least = result;
		break;
	}
	for (const result of front.filter(({ verdict }) => verdict === 'rides-it-out')) yield* askChance(result);
	yield 1;
	return {
		moneyPerHour,
		asPlanned,
		alone: alone.sort((a, b) => b.gainK - a.gainK),
		front,
		least,
		mostCutOutShare,
		tried: candidates.length,
		notTried: [
			...listNotTried(offered, scenario, together),
			...(least === null && rides.length > MOST_CHANCES ? [SAY_MOST_CHANCES] : [])
		]
	};
}
