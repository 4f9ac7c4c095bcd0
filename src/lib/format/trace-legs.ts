import {
	joinLegs,
	moveBoundary,
	setLegKind,
	splitLeg,
	type LegState,
	type TraceLeg
} from '../thermal/traces';
import { MOST_LEG_KMH } from '../schemas/traces';
import { readHour } from './trace-mapping-form';

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

/** What stands in the boxes about legs, by their names: "legs.0.endMin", "legs.0.kind", "legs.0.speedKmh". */
export type LegsDraft = Record<string, string>;

/** A number as people type it; NaN for an empty box and for what is none. */
export const readBox = (text: string): number =>
	text.trim() === '' ? NaN : Number(text.trim().replace(',', '.'));

/** Why a leg cannot end at what was typed; empty where it can. */
export function sayWrongEnd(legs: readonly TraceLeg[], at: number, text: string): string {
	const minutes = readBox(text);
	const low = minutesInto(legs, legs[at]!.startS) + 1;
	const high = minutesInto(legs, legs[at + 1]!.endS) - 1;
	if (minutes >= low && minutes <= high) return '';
	return `“${text}” is no minute from ${low} to ${high}, between the ends of the legs before and after.`;
}

/** Why a leg cannot have been driven at what was typed; empty where it can, or where nothing was. */
export function sayWrongSpeed(text: string): string {
	const speedKmh = readBox(text);
	if (text.trim() === '' || (speedKmh >= 0 && speedKmh <= MOST_LEG_KMH)) return '';
	return `“${text}” is no speed from 0 to ${MOST_LEG_KMH} km/h.`;
}

/** An end as it was typed, or as near to it as the ends after it leave room. */
function placeEnd(typedS: readonly number[], at: number, fromS: number): number {
	const wantedS = typedS[at]!;
	const roomS = typedS
		.map((toS, later) => toS - (later - at) * MINUTE_S)
		.filter((toS, later) => later > at && toS > fromS);
	return Math.min(Math.max(Number.isNaN(wantedS) ? fromS : wantedS, fromS + MINUTE_S), ...roomS);
}

/**
 * The legs of boxes as near as legs can be to them: an end that cannot be is put where there is room. As they are known where the
 * boxes are of more legs than the trace has minutes.
 */
export function legsOfDraft(draft: LegsDraft, known: readonly TraceLeg[]): TraceLeg[] {
	const count = Object.keys(draft).filter((name) => /^legs\.\d+\.endMin$/.test(name)).length;
	const [startS, endS] = [known[0]!.startS, known.at(-1)!.endS];
	if (count === 0 || endS - startS < count * MINUTE_S) return [...known];
	const typedS = Array.from(
		{ length: count },
		(_, at) => startS + Math.round(readBox(draft[`legs.${at}.endMin`] ?? '')) * MINUTE_S
	);
	typedS[count - 1] = endS;
	const legs: TraceLeg[] = [];
	for (let at = 0; at < count; at++) {
		const fromS = legs.at(-1)?.endS ?? startS;
		const toS = placeEnd(typedS, at, fromS);
		const speed = draft[`legs.${at}.speedKmh`] ?? '';
		const meanSpeedKmh = speed.trim() === '' || sayWrongSpeed(speed) ? null : readBox(speed);
		const kind = draft[`legs.${at}.kind`] === 'driving' ? 'driving' : 'stopped';
		const same = known.find((leg) => leg.startS === fromS && leg.endS === toS && leg.kind === kind);
		legs.push({
			...{ startS: fromS, endS: toS, kind, why: same?.why ?? '' },
			meanSpeedKmh: speed === '' ? (same?.meanSpeedKmh ?? null) : meanSpeedKmh
		});
	}
	return legs;
}

/** What cannot be taken of the boxes about legs, each with its name. */
export function listLegProblems(
	draft: LegsDraft,
	known: readonly TraceLeg[]
): { path: string; message: string }[] {
	const legs = legsOfDraft(draft, known);
	const ofLegs = legs.flatMap((_, at) => {
		const [end, speed] = [`legs.${at}.endMin`, `legs.${at}.speedKmh`];
		return [
			{ path: end, message: at < legs.length - 1 ? sayWrongEnd(legs, at, draft[end] ?? '') : '' },
			{ path: speed, message: sayWrongSpeed(draft[speed] ?? '') }
		];
	});
	const hour = draft.startHour ?? '';
	const ofHour = `“${hour}” is no time of day: write it such as 06:30.`;
	return [{ path: 'startHour', message: Number.isNaN(readHour(hour)) ? ofHour : '' }, ...ofLegs].filter(
		({ message }) => message !== ''
	);
}
