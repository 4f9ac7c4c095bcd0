import { requirePositive } from '../correlations/require';
import { requireWhole } from '../statistics/require-whole';
import { MINUTE_S, type BinnedTrace } from './binned-trace';
import { findChangePoints } from './change-points';
import { judgeStretch } from './judge-stretch';
import { gatherEvidence, onGrid } from './leg-evidence';
import { joinLegs, measureLegs, SHORTEST_LEG_S, type TraceLeg } from './trace-legs';

export interface LegOptions {
	/** Shorter legs go into a neighbour, min. */
	shortestMinutes?: number;
	/** With more legs the two that differ least are joined; a day plan for people takes 48. */
	mostLegs?: number;
}

const SHORTEST_MINUTES = 5;
const MOST_PROPOSED_LEGS = 48;
/** What engine, plan and API take at most. */
const MOST_LEGS_EVER = 1000;
/** Two drives whose speeds are nearer than this are one, km/h; engineering judgement. */
const SAME_SPEED_KMH = 15;
/**
 * How much more a change must save than by the criterion of Schwarz: traffic is no white noise about a speed, and a temperature
 * no line. Engineering judgement.
 */
const CAUTION = 3;
/** What tells a drive from a stop more than any speed tells one drive from another, km/h. */
const OTHER_KIND_KMH = 1000;

/** How much two legs differ, km/h; two stops, and two drives of unknown speed, not at all. */
function differ(a: TraceLeg, b: TraceLeg): number {
	if (a.kind !== b.kind) return OTHER_KIND_KMH;
	if (a.kind === 'stopped') return 0;
	return Math.abs((a.meanSpeedKmh ?? 0) - (b.meanSpeedKmh ?? 0));
}

/** The pair of neighbours that differ least, by the place of its first; −1 where there is none. */
function leastDifferent(legs: readonly TraceLeg[]): number {
	let best = -1;
	for (let at = 0; at + 1 < legs.length; at++) {
		if (best < 0 || differ(legs[at]!, legs[at + 1]!) < differ(legs[best]!, legs[best + 1]!)) best = at;
	}
	return best;
}

function joinAlike(legs: readonly TraceLeg[], mostLegs: number): TraceLeg[] {
	let joined = [...legs];
	for (;;) {
		const at = leastDifferent(joined);
		if (at < 0) return joined;
		const difference = differ(joined[at]!, joined[at + 1]!);
		if (difference >= SAME_SPEED_KMH && (joined.length <= mostLegs || difference >= OTHER_KIND_KMH))
			return joined;
		joined = joinLegs(joined, at);
	}
}

const lengthOf = ({ startS, endS }: TraceLeg): number => endS - startS;

/** Puts the shortest leg into the neighbour that is more like it, again and again. */
function joinShort(legs: readonly TraceLeg[], shortestS: number, mostLegs: number): TraceLeg[] {
	let joined = [...legs];
	while (joined.length > 1) {
		const at = joined.reduce(
			(best, leg, index) => (lengthOf(leg) < lengthOf(joined[best]!) ? index : best),
			0
		);
		if (lengthOf(joined[at]!) >= shortestS && joined.length <= mostLegs) return joined;
		const [before, after] = [joined[at - 1], joined[at + 1]];
		const intoBefore = before && (!after || differ(before, joined[at]!) <= differ(joined[at]!, after));
		joined = joinAlike(joinLegs(joined, intoBefore ? at - 1 : at), mostLegs);
	}
	return joined;
}

/**
 * Proposes the legs of a trace, for somebody to put right: where it changes, and whether the vehicle drove.
 *
 * Changes are found by PELT on whole minutes: in the level of the speed where there is one; else in the level of the current and
 * in the slopes of exhaust shield and bay air together, over the outside air where that was measured. Stretches are judged by speed,
 * charge, or warming and cooling, in this order; neighbours that are alike are joined.
 *
 *     β = 3 (p + 1) ln n,   p = 1 for each level, 2 for each line
 *
 * @param trace as it is kept; the whole of it
 * @param options shortestMinutes, 5 unless said; mostLegs, 48 unless said
 * @returns at least one leg; the first begins and the last ends with the trace's minutes, none shorter than a minute
 * @throws EngineInputError for a length not above zero or no whole number of legs
 * Validity: a proposal. Without speed and charge it is a guess, and says so: an engine that runs while the vehicle stands looks like driving, and a boundary can be
 *   minutes late. Traces over 5,000 minutes are looked at on a coarser grid of whole minutes.
 * Source: changes after Killick, Fearnhead and Eckley (2012), see findChangePoints; the penalty grows as the criterion of Schwarz,
 *   Annals of Statistics 6 (1978) 461; the limits are engineering judgement.
 * @example
 * const speeds = [...Array(30).fill(0), ...Array(60).fill(80), ...Array(30).fill(0)];
 * const bins = { count: speeds.map(() => 1), mean: speeds, min: speeds, max: speeds };
 * const base = { timeBase: 'elapsed', timeZone: null, startS: 0, stepS: 60, binCount: 120 };
 * proposeLegs({ ...base, channels: { speedKmh: bins } }).map(({ kind }) => kind); // ['stopped', 'driving', 'stopped']
 */
export function proposeLegs(trace: BinnedTrace, options: LegOptions = {}): TraceLeg[] {
	const { shortestMinutes = SHORTEST_MINUTES, mostLegs = MOST_PROPOSED_LEGS } = options;
	requirePositive({ shortestMinutes });
	requireWhole(1, MOST_LEGS_EVER, { mostLegs });
	const grid = onGrid(trace);
	const evidence = gatherEvidence(grid);
	const signals = evidence.map(({ signal }) => signal);
	const parameters = signals.reduce((sum, { shape }) => sum + (shape === 'line' ? 2 : 1), 0);
	const penalty = CAUTION * (parameters + 1) * Math.log(Math.max(grid.binCount, 2));
	const cuts = signals.length === 0 ? [] : findChangePoints(signals, penalty);
	const ends = [...cuts, grid.binCount];
	// The last place of a coarse grid reaches over the end of the trace.
	const lastS = trace.startS + MINUTE_S * Math.ceil((trace.stepS * trace.binCount) / MINUTE_S - 1e-9);
	const legs = ends.map((end, at): TraceLeg => {
		const from = at === 0 ? 0 : ends[at - 1]!;
		const endS = Math.min(grid.startS + end * grid.stepS, lastS);
		const span = { startS: grid.startS + from * grid.stepS, endS };
		return { ...span, ...judgeStretch(evidence, from, end), meanSpeedKmh: null };
	});
	const measured = joinAlike(measureLegs(grid, legs), mostLegs);
	return joinShort(measured, Math.max(shortestMinutes * MINUTE_S, SHORTEST_LEG_S), mostLegs);
}
