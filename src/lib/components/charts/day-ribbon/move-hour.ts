interface Span {
	fromHour: number;
	toHour: number;
}

const SMALL_STEP_H = 5 / 60;
const LARGE_STEP_H = 1;

const MOVES: Record<string, (hour: number, span: Span) => number> = {
	ArrowRight: (hour) => hour + SMALL_STEP_H,
	ArrowUp: (hour) => hour + SMALL_STEP_H,
	ArrowLeft: (hour) => hour - SMALL_STEP_H,
	ArrowDown: (hour) => hour - SMALL_STEP_H,
	PageUp: (hour) => hour + LARGE_STEP_H,
	PageDown: (hour) => hour - LARGE_STEP_H,
	Home: (_, { fromHour }) => fromHour,
	End: (_, { toHour }) => toHour
};

/** Where a key takes the hairline: arrows five minutes, page keys an hour, Home and End; null for other keys. */
export function moveHour(key: string, hour: number, span: Span): number | null {
	const moved = MOVES[key]?.(hour, span);
	return moved === undefined ? null : Math.min(Math.max(moved, span.fromHour), span.toHour);
}
