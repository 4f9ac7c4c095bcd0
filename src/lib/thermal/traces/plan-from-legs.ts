import { EngineInputError, requireWithin } from '../correlations/require';
import type { PlannedDay, PlannedLeg } from '../survey/types';
import type { ScenarioInput, Surface } from '../types';
import { MINUTE_S, type BinnedTrace } from './binned-trace';
import { meanWithin, type TraceLeg } from './trace-legs';
import { ZoneClock } from './zone-clock';

/** What no trace tells, for the plan made of it. */
export interface PlanChoices {
	name: string;
	/** State of charge at the start, 0 to 1. */
	startSoc: number;
	chargerMaxA: number;
	/** Clock hour of the first leg; needed where the trace does not tell the time of day. */
	startHour?: number;
	surface?: Surface;
	/** Of drives whose speed the trace does not tell, km/h. */
	speedKmh?: number;
	/** Where the trace has no current, A. */
	loadA?: number;
}

const HOUR_S = 3600;
const DAY_S = 86_400;
/** Slower drives are crawls, km/h; engineering judgement. */
const CRAWL_KMH = 30;
/** Stops of this and longer are camps, min; engineering judgement. */
const CAMP_MINUTES = 240;
/** What a leg of a plan can last at most, min. */
const LONGEST_LEG_MINUTES = 24 * 60;
/** A touring speed and a fridge; engineering judgement. */
const DEFAULTS = { surface: 'sealed', speedKmh: 80, loadA: 3 } as const;

/**
 * The clock hour at a time of a trace.
 *
 * @param trace as it is kept
 * @param timeS s, as the trace counts
 * @returns 0 to 24 by the clock of the trace's zone; null where the trace counts from its own start
 * @throws RangeError where the machine does not know the zone
 * Validity: as the zone's table.
 * Source: see ZoneClock.
 * @example
 * clockHourAt({ timeBase: 'time-of-day', timeZone: null }, 5400); // 1.5
 */
export function clockHourAt(trace: Pick<BinnedTrace, 'timeBase' | 'timeZone'>, timeS: number): number | null {
	const { timeBase, timeZone } = trace;
	if (timeBase === 'elapsed') return null;
	const offsetS = timeBase === 'utc' && timeZone !== null ? new ZoneClock(timeZone).offsetAt(timeS) : 0;
	const localS = timeS + offsetS;
	return (localS - DAY_S * Math.floor(localS / DAY_S)) / HOUR_S;
}

/** What the battery gives at stops, A; null where the trace has no current there. */
function findStandingLoadA(trace: BinnedTrace, legs: readonly TraceLeg[]): number | null {
	const stops = legs.filter(({ kind }) => kind === 'stopped');
	let [charge, length] = [0, 0];
	for (const { startS, endS } of stops) {
		const currentA = meanWithin(trace, 'currentA', startS, endS);
		if (currentA === null) continue;
		charge += currentA * (endS - startS);
		length += endS - startS;
	}
	return length === 0 ? null : Math.max(-charge / length, 0);
}

function toPlannedLegs(leg: TraceLeg, loadA: number, choices: PlanChoices): PlannedLeg[] {
	const minutes = (leg.endS - leg.startS) / MINUTE_S;
	const isMoving = leg.kind === 'driving';
	const speedKmh = isMoving ? (leg.meanSpeedKmh ?? choices.speedKmh ?? DEFAULTS.speedKmh) : 0;
	const stop = minutes >= CAMP_MINUTES ? 'camp' : 'stop';
	const planned: Omit<PlannedLeg, 'minutes'> = {
		kind: isMoving ? (speedKmh < CRAWL_KMH ? 'crawl' : 'drive') : stop,
		speedKmh,
		surface: choices.surface ?? DEFAULTS.surface,
		...{ gradePercent: 0, towing: false, engineOn: isMoving, bonnetOpen: false, loadA }
	};
	const parts = Math.ceil(minutes / LONGEST_LEG_MINUTES);
	return Array.from({ length: parts }, () => ({ ...planned, minutes: minutes / parts }));
}

/**
 * The day plan that a trace's legs make, for running the engine over the day that was measured.
 *
 * Drives below 30 km/h are crawls, stops of four hours and longer camps. The load is what the battery gave at the stops.
 *
 * @param trace as it is kept
 * @param legs its legs, following each other
 * @param choices what no trace tells: name, state of charge, charger (A), and surface, speed (km/h) and load (A) where it is silent
 * @returns a plan that begins at the clock hour of the first leg
 * @throws EngineInputError where there are no legs, or nobody knows the hour at which they begin
 * Validity: the clock of the zone is taken for solar time, as everywhere in the engine's plans.
 * Source: rules of this engine; limits are engineering judgement.
 * @example
 * const trace = { timeBase: 'time-of-day', timeZone: null, startS: 0, stepS: 60, binCount: 600, channels: {} };
 * const legs = [{ startS: 28800, endS: 32400, kind: 'driving', meanSpeedKmh: 90, why: '' }];
 * const plan = dayPlanFromLegs(trace, legs, { name: 'Measured', startSoc: 0.6, chargerMaxA: 40 });
 * [plan.startHour, plan.legs[0].minutes, plan.legs[0].kind]; // [8, 60, 'drive']
 */
export function dayPlanFromLegs(
	trace: BinnedTrace,
	legs: readonly TraceLeg[],
	choices: PlanChoices
): PlannedDay {
	if (legs.length === 0) throw new EngineInputError('legs.length', 0, 'at least 1');
	const startHour = choices.startHour ?? clockHourAt(trace, legs[0]!.startS);
	if (startHour === null) {
		throw new EngineInputError('startHour', NaN, 'given where the trace does not tell the time of day');
	}
	requireWithin(0, 24, { startHour });
	const { name, startSoc, chargerMaxA } = choices;
	const loadA = findStandingLoadA(trace, legs) ?? choices.loadA ?? DEFAULTS.loadA;
	return {
		name,
		startHour,
		startSoc,
		chargerMaxA,
		legs: legs.flatMap((leg) => toPlannedLegs(leg, loadA, choices))
	};
}

/**
 * The legs of a plan as a scenario takes them, without a trailer.
 *
 * @param plan as dayPlanFromLegs makes it
 * @returns legs for parseScenario
 * Validity: plans without towing; with a trailer build the scenario from the survey.
 * Source: rules of this engine.
 * @example
 * scenarioLegs({ legs: [{ kind: 'stop', minutes: 30, speedKmh: 0, engineOn: false, towing: false, loadA: 3 }] })[0].minutes; // 30
 */
export function scenarioLegs(plan: Pick<PlannedDay, 'legs'>): ScenarioInput['legs'] {
	return plan.legs.map(({ kind: _kind, towing: _towing, ...leg }) => leg);
}
