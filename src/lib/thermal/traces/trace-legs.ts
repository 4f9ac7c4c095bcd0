import { EngineInputError } from '../correlations/require';
import type { BinnedTrace } from './binned-trace';
import { MINUTE_S } from './binned-trace';

export const LEG_STATES = ['driving', 'stopped'] as const;
export type LegState = (typeof LEG_STATES)[number];

/** A stretch of a trace over which the vehicle did one thing; legs follow each other without a gap. */
export interface TraceLeg {
	startS: number;
	endS: number;
	kind: LegState;
	/** Null where the trace does not tell. */
	meanSpeedKmh: number | null;
	/** What the leg was known by, in a few words. */
	why: string;
}

export const SHORTEST_LEG_S = MINUTE_S;
const BY_HAND = 'set by hand';

function legAt(legs: readonly TraceLeg[], index: number, last: number): TraceLeg {
	const leg = legs[index];
	if (leg && index <= last) return leg;
	throw new EngineInputError('index', index, `a whole number within 0 to ${last}`);
}

function requireRoom(input: string, value: number, fromS: number, toS: number): void {
	const [low, high] = [fromS + SHORTEST_LEG_S, toS - SHORTEST_LEG_S];
	if (value >= low && value <= high) return;
	const limit = low > high ? 'in a leg of two minutes or more' : `within ${low} to ${high}`;
	throw new EngineInputError(input, value, `${limit}, so that no leg is shorter than a minute`);
}

const replace = (
	legs: readonly TraceLeg[],
	from: number,
	count: number,
	by: readonly TraceLeg[]
): TraceLeg[] => [...legs.slice(0, from), ...by, ...legs.slice(from + count)];

/**
 * Moves the end of one leg, and with it the beginning of the next.
 *
 * @param legs legs that follow each other
 * @param index of the leg whose end is moved, from 0; not the last
 * @param toS where it is to end, s, as the trace counts
 * @returns new legs; speeds stay as they were until measureLegs reads them anew
 * @throws EngineInputError for a leg that has no next, or an end that leaves one of the two shorter than a minute
 * Validity: legs of one trace.
 * Source: rules of this engine.
 * @example
 * const leg = { kind: 'driving', meanSpeedKmh: null, why: '' };
 * moveBoundary([{ ...leg, startS: 0, endS: 300 }, { ...leg, startS: 300, endS: 600 }], 0, 420)[1].startS; // 420
 */
export function moveBoundary(legs: readonly TraceLeg[], index: number, toS: number): TraceLeg[] {
	const before = legAt(legs, index, legs.length - 2);
	const after = legs[index + 1]!;
	requireRoom('toS', toS, before.startS, after.endS);
	return replace(legs, index, 2, [
		{ ...before, endS: toS },
		{ ...after, startS: toS }
	]);
}

/**
 * Makes two legs of one.
 *
 * @param legs legs that follow each other
 * @param index of the leg, from 0
 * @param atS where the second begins, s, as the trace counts
 * @returns new legs, one more; both are of the kind that the one was
 * @throws EngineInputError for a leg that is not there, or a place that leaves one of the two shorter than a minute
 * Validity: legs of one trace.
 * Source: rules of this engine.
 * @example
 * splitLeg([{ startS: 0, endS: 600, kind: 'driving', meanSpeedKmh: 80, why: '' }], 0, 240).length; // 2
 */
export function splitLeg(legs: readonly TraceLeg[], index: number, atS: number): TraceLeg[] {
	const leg = legAt(legs, index, legs.length - 1);
	requireRoom('atS', atS, leg.startS, leg.endS);
	return replace(legs, index, 1, [
		{ ...leg, endS: atS },
		{ ...leg, startS: atS }
	]);
}

function joinedSpeed(a: TraceLeg, b: TraceLeg): number | null {
	if (a.meanSpeedKmh === null || b.meanSpeedKmh === null) return a.meanSpeedKmh ?? b.meanSpeedKmh;
	const [lengthA, lengthB] = [a.endS - a.startS, b.endS - b.startS];
	return (a.meanSpeedKmh * lengthA + b.meanSpeedKmh * lengthB) / (lengthA + lengthB);
}

/**
 * Makes one leg of two.
 *
 *     v = (v₁ t₁ + v₂ t₂)/(t₁ + t₂)
 *
 * @param legs legs that follow each other
 * @param index of the first of the two, from 0; not the last
 * @returns new legs, one fewer; kind and reason are those of the longer, of two alike the first
 * @throws EngineInputError for a leg that has no next
 * Validity: legs of one trace.
 * Source: mean over time.
 * @example
 * const leg = { kind: 'driving', why: '' };
 * const [one] = joinLegs([{ ...leg, startS: 0, endS: 60, meanSpeedKmh: 60 }, { ...leg, startS: 60, endS: 240, meanSpeedKmh: 80 }], 0);
 * one.meanSpeedKmh; // 75
 */
export function joinLegs(legs: readonly TraceLeg[], index: number): TraceLeg[] {
	const first = legAt(legs, index, legs.length - 2);
	const second = legs[index + 1]!;
	const longer = second.endS - second.startS > first.endS - first.startS ? second : first;
	const { kind, why } = longer;
	const span = { startS: first.startS, endS: second.endS };
	return replace(legs, index, 2, [{ ...span, kind, meanSpeedKmh: joinedSpeed(first, second), why }]);
}

/**
 * Says what the vehicle did in a leg.
 *
 * @param legs legs that follow each other
 * @param index of the leg, from 0
 * @param kind 'driving' or 'stopped'
 * @returns new legs
 * @throws EngineInputError for a leg that is not there
 * Validity: legs of one trace.
 * Source: rules of this engine.
 * @example
 * setLegKind([{ startS: 0, endS: 600, kind: 'driving', meanSpeedKmh: 2, why: '' }], 0, 'stopped')[0].why; // 'set by hand'
 */
export function setLegKind(legs: readonly TraceLeg[], index: number, kind: LegState): TraceLeg[] {
	const leg = legAt(legs, index, legs.length - 1);
	return replace(legs, index, 1, [{ ...leg, kind, why: BY_HAND }]);
}

/** Mean of a channel's values in bins that begin within a time; null where there are none. */
export function meanWithin(
	trace: BinnedTrace,
	channel: 'speedKmh' | 'currentA',
	fromS: number,
	toS: number
): number | null {
	const bins = trace.channels[channel];
	if (!bins) return null;
	const { startS, stepS } = trace;
	const first = Math.max(Math.ceil((fromS - startS) / stepS - 1e-6), 0);
	const end = Math.min(Math.ceil((toS - startS) / stepS - 1e-6), bins.count.length);
	let [sum, bin] = [0, first];
	let told = 0;
	// A bin counts once, however many values are in it: loggers that write more while driving must not count it double.
	for (; bin < end; bin++) {
		if (bins.count[bin] === 0) continue;
		sum += bins.mean[bin]!;
		told++;
	}
	return told === 0 ? null : sum / told;
}

/**
 * Reads the mean speed of each leg anew, after boundaries were moved.
 *
 * @param trace as it is kept
 * @param legs legs of that trace
 * @returns new legs with meanSpeedKmh, null where the trace has no speed in the leg
 * Validity: speed in bins of up to a minute.
 * Source: mean over time.
 * @example
 * const bins = { count: [1, 1], mean: [60, 80], min: [60, 80], max: [60, 80] };
 * const trace = { timeBase: 'elapsed', timeZone: null, startS: 0, stepS: 60, binCount: 2, channels: { speedKmh: bins } };
 * measureLegs(trace, [{ startS: 0, endS: 120, kind: 'driving', meanSpeedKmh: null, why: '' }])[0].meanSpeedKmh; // 70
 */
export function measureLegs(trace: BinnedTrace, legs: readonly TraceLeg[]): TraceLeg[] {
	return legs.map((leg) => ({ ...leg, meanSpeedKmh: meanWithin(trace, 'speedKmh', leg.startS, leg.endS) }));
}
