export interface StepRange {
	step: number;
	min?: number;
	max?: number;
}

const decimalsOf = (step: number): number => String(step).split('.')[1]?.length ?? 0;

/** One step up or down from a value, held inside the range; a value off the grid keeps its own decimals. */
export function stepValue(value: number, direction: 1 | -1, { step, min, max }: StepRange): number {
	const moved = value + direction * step;
	const decimals = Math.max(decimalsOf(step), decimalsOf(value));
	return Math.min(max ?? Infinity, Math.max(min ?? -Infinity, Number(moved.toFixed(decimals))));
}
