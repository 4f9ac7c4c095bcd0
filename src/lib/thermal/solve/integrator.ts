import type { Step, Stepper } from './stepper';

/** Reasons for which a run is given up; it is returned, never thrown. */
export type Failure = 'impossible_temperature' | 'step_too_small' | 'too_many_steps';

export interface IntegratorOptions {
	/** Error allowed in one step, K, node by node. */
	toleranceK: Float64Array;
	/** The most steps of a whole run, tried ones included. */
	mostSteps: number;
	/** The first place in a step, 0…1, where a heat bends sharply; steps are shortened to end there. */
	findBend?: (step: Step) => number | null;
	/** The most that is suggested after a bend, s. */
	afterBendS?: number;
}

/** Called with each step that meets the tolerance: null takes it, a share 0…1 repeats it up to there. */
export type StepWatcher = (step: Step) => number | null;

/** How far an advance came; where that was, and what went wrong, the integrator says. */
export type Reached = 'end' | 'stop' | 'failed';

const SHORTEST_STEP_S = 1e-9;
const SAFETY = 0.95;
const LEAST_FACTOR = 0.15;
const MOST_FACTOR = 6;
/** A step may be this much longer than suggested when it then reaches the end. */
const STRETCH = 1.1;
/** How often a step is shortened to end at a bend before it is taken as it is. */
const MOST_BENDS = 6;
/** Outside of these a temperature is not one of a vehicle. */
const ABSOLUTE_ZERO_C = -273.15;
const HOTTEST_C = 20_000;

/** Takes steps of a length that keeps each one within the tolerance. Nothing is allocated on the way. */
export class Integrator {
	steps = 0;
	/** Where the last advance came to, s. */
	timeS = 0;
	/** Why it failed. */
	failure: Failure | null = null;
	private tried = 0;
	private suggestedS = 1;
	private readonly perToleranceK: Float64Array;

	constructor(
		private readonly stepper: Stepper,
		private readonly options: IntegratorOptions
	) {
		this.perToleranceK = options.toleranceK.map((tolerance) => 1 / tolerance);
	}

	/** Begins a new run. */
	reset(): void {
		this.steps = 0;
		this.tried = 0;
		this.suggestedS = 1;
		this.failure = null;
	}

	/** After a sudden change: suggests no more than this for the first step. */
	restart(firstStepS: number): void {
		if (firstStepS < this.suggestedS) this.suggestedS = firstStepS;
	}

	/** Where something bends a little: suggests this share of what was suggested. */
	ease(share: number): void {
		this.suggestedS *= share;
	}

	/**
	 * Integrates `temps` in place from `timeS` to `endS`, or up to where `watch` stops it.
	 *
	 * `accept` sees every step that counts, the one up to a stop included.
	 */
	advance(
		timeS: number,
		endS: number,
		temps: Float64Array,
		watch: StepWatcher,
		accept: (step: Step) => void
	): Reached {
		const { stepper } = this;
		this.timeS = timeS;
		while (this.timeS < endS) {
			const left = endS - this.timeS;
			stepper.prepare(this.timeS, temps, Math.min(left, this.suggestedS), this.timeS > timeS);
			this.failure = this.takeStep(left);
			if (this.failure) return 'failed';
			const stopAt = watch(stepper.step);
			if (stopAt !== null) return this.stopAt(stopAt * stepper.step.lengthS, temps, accept);
			const toEnd = stepper.step.lengthS >= left;
			this.timeS = toEnd ? endS : this.timeS + stepper.step.lengthS;
			this.finishStep(temps, accept);
		}
		return 'end';
	}

	/** Repeats the step up to where it is stopped. */
	private stopAt(lengthS: number, temps: Float64Array, accept: (step: Step) => void): Reached {
		if (lengthS > SHORTEST_STEP_S) {
			if (!this.stepper.tryStep(lengthS)) {
				this.failure = 'impossible_temperature';
				return 'failed';
			}
			this.finishStep(temps, accept);
			this.timeS += lengthS;
		}
		return 'stop';
	}

	private finishStep(temps: Float64Array, accept: (step: Step) => void): void {
		const { to } = this.stepper.step;
		for (let i = 0; i < to.length; i++) temps[i] = to[i]!;
		this.stepper.finish();
		this.steps++;
		accept(this.stepper.step);
	}

	/** Tries shorter and shorter steps until one is within the tolerance. */
	private takeStep(leftS: number): Failure | null {
		let length = this.fitLength(leftS);
		let bends = 0;
		for (;;) {
			if (++this.tried > this.options.mostSteps) return 'too_many_steps';
			const error = this.stepper.tryStep(length) ? this.measureError() : Infinity;
			const bend = error < Infinity && bends < MOST_BENDS ? this.findBend() : null;
			if (bend !== null) {
				bends++;
				length *= bend;
				continue;
			}
			if (error <= 1) {
				const grown = length * Math.min(MOST_FACTOR, SAFETY / fourthRoot(Math.max(error, 1e-8)));
				this.suggestedS = length < this.suggestedS ? Math.max(grown, this.suggestedS) : grown;
				if (bends > 0) this.restart(this.options.afterBendS ?? Infinity);
				return null;
			}
			const factor = error < Infinity ? Math.max(LEAST_FACTOR, SAFETY / fourthRoot(error)) : LEAST_FACTOR;
			length *= Math.min(factor, 0.9);
			this.suggestedS = length;
			if (length < SHORTEST_STEP_S) return error < Infinity ? 'step_too_small' : 'impossible_temperature';
		}
	}

	private findBend(): number | null {
		const { findBend } = this.options;
		return findBend === undefined ? null : findBend(this.stepper.step);
	}

	/** The suggested length, evened out so that no sliver is left before the end. */
	private fitLength(leftS: number): number {
		if (this.suggestedS * STRETCH >= leftS) return leftS;
		return this.suggestedS > leftS / 2 ? leftS / 2 : this.suggestedS;
	}

	/** Largest error in units of the tolerance; infinite when a temperature is impossible. */
	private measureError(): number {
		const { error, to } = this.stepper.step;
		let largest = 0;
		for (let i = 0; i < error.length; i++) {
			if (!(to[i]! > ABSOLUTE_ZERO_C && to[i]! < HOTTEST_C)) return Infinity;
			const scaled = Math.abs(error[i]!) * this.perToleranceK[i]!;
			if (!(scaled <= largest)) largest = scaled;
		}
		return largest === largest ? largest : Infinity;
	}
}

/** The fourth root from square roots, which give the same digits everywhere. */
function fourthRoot(value: number): number {
	return Math.sqrt(Math.sqrt(value));
}
