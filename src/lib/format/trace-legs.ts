import {
	joinLegs,
	moveBoundary,
	setLegKind,
	splitLeg,
	type LegState,
	type TraceLeg
} from '../thermal/traces';

const MINUTE_S = 60;
const SHORTEST_TO_SPLIT_S = 2 * MINUTE_S;

/** What can be done to legs, wherever it is done: under the plot, by a key, or by a form without a script. */
export type LegEdit =
	| { kind: 'move'; at: number; toS: number }
	| { kind: 'join'; at: number }
	| { kind: 'split'; at: number }
	| { kind: 'be'; at: number; state: LegState }
	| { kind: 'drive'; at: number; speedKmh: number | null };

/** Between what the end of a leg can be moved, so that neither of the two is shorter than a minute. */
export function roomOf(legs: readonly TraceLeg[], at: number): { lowS: number; highS: number } {
	return { lowS: legs[at]!.startS + MINUTE_S, highS: legs[at + 1]!.endS - MINUTE_S };
}

export const maySplit = ({ startS, endS }: TraceLeg): boolean => endS - startS >= SHORTEST_TO_SPLIT_S;

/** Whole minutes from where the legs begin, as everything about them is. */
const toMinute = (atS: number, startS: number): number =>
	startS + Math.round((atS - startS) / MINUTE_S) * MINUTE_S;

/** Legs after an edit; one that cannot be leaves them as they are, and a boundary stops where there is no more room. */
export function editLegs(legs: readonly TraceLeg[], edit: LegEdit): TraceLeg[] {
	const leg = legs[edit.at];
	const isLast = edit.at === legs.length - 1;
	if (!leg) return [...legs];
	if (edit.kind === 'be') return leg.kind === edit.state ? [...legs] : setLegKind(legs, edit.at, edit.state);
	if (edit.kind === 'drive') {
		return legs.map((each, at) => (at === edit.at ? { ...each, meanSpeedKmh: edit.speedKmh } : each));
	}
	if (edit.kind === 'split') {
		if (!maySplit(leg)) return [...legs];
		return splitLeg(legs, edit.at, toMinute((leg.startS + leg.endS) / 2, leg.startS));
	}
	if (isLast) return [...legs];
	if (edit.kind === 'join') return joinLegs(legs, edit.at);
	const { lowS, highS } = roomOf(legs, edit.at);
	const toS = Math.min(Math.max(toMinute(edit.toS, legs[0]!.startS), lowS), highS);
	return moveBoundary(legs, edit.at, toS);
}

/** Minutes from the start of the trace, as they stand in a box. */
export const minutesInto = (legs: readonly TraceLeg[], atS: number): number =>
	Math.round((atS - legs[0]!.startS) / MINUTE_S);
