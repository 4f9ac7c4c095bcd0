export const STEPS_BOX = { width: 340, height: 168, left: 30, right: 16, top: 18, bottom: 40 } as const;

export interface ErrorStep {
	fromK: number;
	toK: number;
	readings: number;
}

export interface StepsDrawing {
	bars: { x: number; y: number; width: number; height: number }[];
	/** Where measured and predicted are the same. */
	zeroX: number;
	xTicks: { kelvin: number; x: number }[];
	yTicks: { readings: number; y: number }[];
}

const TICK_EVERY_K = 10;
const GAP = 1.5;
const TICK_STEPS = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1_000, 2_000, 5_000];
const MOST_TICKS = 4;

const round = (px: number): number => Math.round(px * 10) / 10;

/** How many errors lie in each step, as bars side by side. */
export function drawErrorSteps(steps: readonly ErrorStep[]): StepsDrawing {
	const { width, height, left, right, top, bottom } = STEPS_BOX;
	const foot = height - bottom;
	const [from, to] = [steps[0]!.fromK, steps.at(-1)!.toK];
	const most = Math.max(...steps.map(({ readings }) => readings), 1);
	const step = TICK_STEPS.find((each) => most / each <= MOST_TICKS) ?? Math.ceil(most / MOST_TICKS);
	const full = Math.ceil(most / step) * step;
	const x = (kelvin: number): number => left + ((kelvin - from) / (to - from)) * (width - left - right);
	const y = (readings: number): number => foot - (readings / full) * (foot - top);
	const kelvins = steps.map(({ fromK }) => fromK).filter((kelvin) => kelvin % TICK_EVERY_K === 0);
	return {
		bars: steps.map(({ fromK, toK, readings }) => ({
			...{ x: round(x(fromK) + GAP / 2), width: round(x(toK) - x(fromK) - GAP) },
			...{ y: round(y(readings)), height: round(foot - y(readings)) }
		})),
		zeroX: round(x(0)),
		xTicks: [...kelvins, to].map((kelvin) => ({ kelvin, x: round(x(kelvin)) })),
		yTicks: Array.from({ length: full / step + 1 }, (_, at) => ({
			readings: at * step,
			y: round(y(at * step))
		}))
	};
}
