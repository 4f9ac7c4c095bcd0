import type { BmsEvent, Scenario } from '../types';

/** A stretch of the run; `open` when the run ended before it did. */
export interface HourSpan {
	fromHour: number;
	toHour: number;
	open: boolean;
}

/** The clock hour at which the last leg ends; runs on past 24. */
export function findEndHour({ start, legs }: Pick<Scenario, 'start' | 'legs'>): number {
	return legs.reduce((hour, { minutes }) => hour + minutes / 60, start.hour);
}

/** The stretches over which a latch stood open, from its events. */
export function findSpans(events: readonly BmsEvent[], side: BmsEvent['side'], endHour: number): HourSpan[] {
	const spans: HourSpan[] = [];
	for (const event of events) {
		if (event.side !== side) continue;
		if (event.kind === 'cut') spans.push({ fromHour: event.hour, toHour: endHour, open: true });
		else Object.assign(spans.at(-1) ?? {}, { toHour: event.hour, open: false });
	}
	return spans;
}

export function sumHours(spans: readonly HourSpan[]): number {
	return spans.reduce((hours, span) => hours + span.toHour - span.fromHour, 0);
}
