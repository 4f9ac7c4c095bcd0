/** One step: T(s) = T0 (1−s) + s (T1 + (1−s) (c2 + s c3)), 0 ≤ s ≤ 1. */
export interface Step {
	timeS: number;
	lengthS: number;
	readonly from: Float64Array;
	readonly to: Float64Array;
	readonly inner2: Float64Array;
	readonly inner3: Float64Array;
	/** Difference to the embedded solution of order 3, K. */
	readonly error: Float64Array;
}

/** Takes single steps of a heat system; says nothing about how long they should be. */
export interface Stepper {
	readonly step: Step;
	/** How often the heats were worked out. */
	evaluations: number;
	/**
	 * Takes up a new starting point.
	 *
	 * @param withinS about how long the step will be, s
	 * @param goesOn the point is the end of the last step and nothing has changed there
	 */
	prepare(timeS: number, temps: Float64Array, withinS: number, goesOn: boolean): void;
	/** Tries one step of the length given from the point taken up; false when the matrix cannot be solved. */
	tryStep(lengthS: number): boolean;
	/** The step that was tried last counts. */
	finish(): void;
}

/** The temperature of one node inside a step, °C; `share` runs from 0 to 1. */
export function readStep(step: Step, node: number, share: number): number {
	const rest = 1 - share;
	return (
		step.from[node]! * rest +
		share * (step.to[node]! + rest * (step.inner2[node]! + share * step.inner3[node]!))
	);
}
