import { expectLife, type ExpectedLife, type Wear } from '../assess/expected-life';
import { findSafeEnvelope, type SafeEnvelope } from '../assess/safe-envelope';
import {
	MOST_TOGETHER,
	searchRemedies,
	type RemedyOffer,
	type RemedySearch
} from '../assess/search-remedies';
import { findHottestAirC } from '../assess/curves';
import type { HeatLimits } from '../chemistries/guard';
import { EngineInputError } from '../correlations/require';
import type { Scenario } from '../types';
import { countCutOutDays, type CutOutDays, type TouringYear } from '../uncertainty/cut-out-days';
import { finishWork, partOf } from '../uncertainty/finish-work';
import { rankInfluences, type Influences } from '../uncertainty/influence';
import { spreadDay, type DaySpread } from '../uncertainty/spread-day';
import { runScenario } from '../vehicle/simulate';
import { ENGINE_VERSION } from '../version';
import { sizeCableAndFuse, type CableAndFuse, type CableSizing } from '../wiring';

/** How hard each part works: draws, points, replicates. */
export interface OutlookEffort {
	daySamples: number;
	yearSamples: number;
	influencePoints: number;
	influenceReplicates: number;
	remedySamples: number;
	/** How many remedies are tried together. */
	remediesTogether: number;
	envelopeSamples: number;
}

/** What is worked out for an assessment that is kept. */
export const FULL_EFFORT: OutlookEffort = {
	daySamples: 512,
	yearSamples: 64,
	influencePoints: 32,
	influenceReplicates: 4,
	remedySamples: 64,
	remediesTogether: MOST_TOGETHER,
	envelopeSamples: 16
};

/** The same of fewer draws, each said beside what comes of it. */
export const LIGHT_EFFORT: OutlookEffort = {
	...FULL_EFFORT,
	...{ daySamples: 128, yearSamples: 16, influencePoints: 8, influenceReplicates: 2 },
	...{ remedySamples: 32, remediesTogether: 3, envelopeSamples: 8 }
};

export interface OutlookRequest {
	scenario: Scenario;
	year: TouringYear;
	wear: Wear;
	offers: readonly RemedyOffer[];
	moneyPerHour: number;
	/** The cable and fuse that are proposed, without the air, which the run finds; null when nobody has said. */
	cable: Omit<CableAndFuse, 'cableAirC' | 'fuseAirC'> | null;
	/** Of a battery that nothing switches off; null for one with a BMS. */
	limits: HeatLimits | null;
	seed: number;
	effort: OutlookEffort;
	/** The share of dark days that is still called riding it out. */
	mostCutOutShare: number;
}

/** What an estimate says beside its number. */
export interface Outlook {
	engineVersion: string;
	seed: number;
	day: DaySpread;
	year: CutOutDays;
	influences: Influences;
	remedies: RemedySearch;
	envelope: SafeEnvelope;
	/** Null with the reason beside it where the models do not reach. */
	life: ExpectedLife | null;
	lifeProblem: string | null;
	/** Null where none is proposed, or with the reason beside it. */
	cable: (CableSizing & { airC: number }) | null;
	cableProblem: string | null;
}

/** How far the work is, and with what. */
export interface OutlookProgress {
	share: number;
	part: keyof typeof PART_SHARES;
}

/** About how much of the work each part is. */
const PART_SHARES = {
	day: 0.2,
	year: 0.18,
	influences: 0.24,
	remedies: 0.16,
	envelope: 0.2,
	life: 0.02
} as const;

function follow<T>(
	work: Generator<number, T>,
	part: OutlookProgress['part'],
	before: number
): Generator<OutlookProgress, T> {
	return partOf(work, (share) => ({ part, share: before + share * PART_SHARES[part] }));
}

/**
 * Everything that an estimate must say beside its number: how sure it is, how many days a year, what to measure first, what it
 * would take, how hot a day it bears, how the battery wears, what cable and fuse are worth there.
 *
 * @param request the scenario of the assessment with what is known beside it, the seed, and how hard to work
 * @returns as a generator, yields after each run how far the work is, so that whoever drives it can do other things
 *   between; returns the outlook
 * @throws RunFailedError when one of the runs cannot be finished, EngineInputError for a cable that cannot be
 * Validity: as its parts. The same request gives the same digits.
 * Source: as its parts.
 * @example
 * const scenario = defaultScenario([{ minutes: 60, engineOn: true }, { minutes: 60 }]);
 * const year = { months: Array(12).fill({ meanMaxC: 20, spreadK: 3 }), daysOnRoad: Array(12).fill(2) };
 * const effort = { daySamples: 16, yearSamples: 2, influencePoints: 2, influenceReplicates: 2, remedySamples: 2, remediesTogether: 1, envelopeSamples: 0 };
 * const rest = { offers: [], moneyPerHour: 100, cable: null, limits: null, seed: 1, effort, mostCutOutShare: 0.05 };
 * const work = makeOutlook({ scenario, year, wear: { law: 'none' }, ...rest });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.day.samples; // 16
 */
export function* makeOutlook(request: OutlookRequest): Generator<OutlookProgress, Outlook> {
	const { scenario, year, wear, seed, effort, limits } = request;
	let before = 0;
	const next = (part: OutlookProgress['part']): number => {
		const at = before;
		before += PART_SHARES[part];
		return at;
	};
	const day = yield* follow(spreadDay(scenario, { samples: effort.daySamples, seed }), 'day', next('day'));
	const days = yield* follow(
		countCutOutDays(scenario, year, { samples: effort.yearSamples, seed }),
		'year',
		next('year')
	);
	const influences = yield* follow(
		rankInfluences(scenario, {
			pointsEach: effort.influencePoints,
			replicates: effort.influenceReplicates,
			seed
		}),
		'influences',
		next('influences')
	);
	const remedies = yield* follow(
		searchRemedies(scenario, {
			offers: request.offers,
			moneyPerHour: request.moneyPerHour,
			samples: effort.remedySamples,
			together: effort.remediesTogether,
			seed,
			limits,
			bareCutOutShare: day.cutOutShare,
			mostCutOutShare: request.mostCutOutShare
		}),
		'remedies',
		next('remedies')
	);
	const envelope = yield* follow(
		findSafeEnvelope(scenario, { samples: effort.envelopeSamples, seed, limits }),
		'envelope',
		next('envelope')
	);
	yield { part: 'life', share: next('life') };
	const life = within(() => expectLife(scenario, year, wear));
	const sized = within(() => sizeCable(request));
	return {
		...{ engineVersion: ENGINE_VERSION, seed, day, year: days, influences, remedies, envelope },
		...{ life: life.value, lifeProblem: life.problem, cable: sized.value, cableProblem: sized.problem }
	};
}

/** What a part gives; where a figure lies outside what its formulas are for, the reason in its place. */
function within<T>(work: () => T): { value: T | null; problem: string | null } {
	try {
		return { value: work(), problem: null };
	} catch (error) {
		if (!(error instanceof EngineInputError)) throw error;
		return { value: null, problem: error.message };
	}
}

/** Cable and fuse in the hottest air of the planned day. */
function sizeCable({ scenario, cable }: OutlookRequest): Outlook['cable'] {
	if (cable === null) return null;
	const run = runScenario(scenario);
	if (run.status === 'failed') return null;
	const airC = findHottestAirC(scenario, run.minutes);
	return { ...sizeCableAndFuse({ ...cable, cableAirC: airC, fuseAirC: airC }), airC };
}

/**
 * The outlook at once, for who has nothing else to do.
 *
 * @param request as makeOutlook takes it
 * @returns as makeOutlook
 * @throws as makeOutlook
 * Validity: as makeOutlook.
 * Source: as makeOutlook.
 * @example
 * const scenario = defaultScenario([{ minutes: 60, engineOn: true }]);
 * const year = { months: Array(12).fill({ meanMaxC: 20, spreadK: 3 }), daysOnRoad: Array(12).fill(2) };
 * const effort = { daySamples: 16, yearSamples: 2, influencePoints: 2, influenceReplicates: 2, remedySamples: 2, remediesTogether: 1, envelopeSamples: 0 };
 * const rest = { offers: [], moneyPerHour: 100, cable: null, limits: null, effort, mostCutOutShare: 0.05 };
 * finishOutlook({ scenario, year, wear: { law: 'none' }, seed: 7, ...rest }).seed; // 7
 */
export function finishOutlook(request: OutlookRequest): Outlook {
	return finishWork(makeOutlook(request));
}
