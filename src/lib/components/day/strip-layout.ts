import { hoursOf, isStill, type LegDraft, type PlanDraft } from '$lib/format/plan-draft';
import { formatHourTick } from '$lib/format/time';
import type { Surface } from '$lib/thermal/types';
import { surfacePath } from '../charts/day-ribbon/strip';

export const STRIP_PX = 44;
const GAP_PX = 1.5;
/** So far from a boundary stands the grip that moves it, and no nearer to the paper's edge. */
const GRIP_OFF_PX = 24;
const TICK_ROOM_PX = 56;
const TICK_STEPS_H = [1, 2, 3, 4, 6, 12, 24];

export interface LegShape {
	leg: LegDraft;
	left: number;
	width: number;
	/** The road along the lower edge; null where there is none to see. */
	texture: string | null;
}

export interface StripLayout {
	legs: LegShape[];
	ticks: { x: number; word: string }[];
	/** Where each boundary stands: the start, between the legs, the end. */
	boundaries: number[];
	minutesPerPx: number;
}

function shapeOf(leg: LegDraft, left: number, right: number): LegShape {
	const from = left + GAP_PX / 2;
	const width = Math.max(right - left - GAP_PX, 0.5);
	const box = { left: from, right: from + width, top: 0, bottom: STRIP_PX };
	const texture = isStill(leg) ? null : surfacePath(leg.surface as Surface, box);
	return { leg, left: from, width, texture };
}

/** The legs of a day along the clock, as wide as the paper; null while there is no time to draw. */
export function layOutStrip(draft: PlanDraft, widthPx: number): StripLayout | null {
	const hours = hoursOf(draft);
	const from = hours[0]!;
	const span = hours[hours.length - 1]! - from;
	if (span <= 0 || widthPx <= 0) return null;
	const x = (hour: number): number => ((hour - from) / span) * widthPx;
	const boundaries = hours.map(x);
	const step = TICK_STEPS_H.find((hoursEach) => (hoursEach / span) * widthPx >= TICK_ROOM_PX) ?? 24;
	const ticks = [];
	for (let hour = Math.ceil(from / step) * step; hour <= from + span; hour += step) {
		const at = x(hour);
		if (at > 14 && at < widthPx - 14) ticks.push({ x: at, word: formatHourTick(hour) });
	}
	return {
		legs: draft.legs.map((leg, index) => shapeOf(leg, boundaries[index]!, boundaries[index + 1]!)),
		ticks,
		boundaries,
		minutesPerPx: (span * 60) / widthPx
	};
}

/** Two grips of one leg never lie upon one another: the one at its start stands left, the one at its end right. */
export function gripX(boundaryX: number, side: 'start' | 'end', widthPx: number): number {
	const wished = boundaryX + (side === 'start' ? -GRIP_OFF_PX : GRIP_OFF_PX);
	return Math.min(Math.max(wished, GRIP_OFF_PX), widthPx - GRIP_OFF_PX);
}
