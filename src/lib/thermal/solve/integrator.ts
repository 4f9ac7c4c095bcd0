import type { HeatSystem } from './heat-system';
import { RosenbrockStepper, type Step } from './rosenbrock';

/** Reasons for which a run is given up; it is returned, never thrown. */
export type Failure = 'impossible_temperature' | 'step_too_small' | 'too_many_steps';

export interface IntegratorOptions {
	/** Error allowed in one step, K, node by node. */
	toleranceK: Float64Array;
	/** The most steps of a whole run, tried ones included. */
	mostSteps: number;
}

/** Called with each step that meets the tolerance: null takes it, a share 0…1 repeats it up to there. */
export type StepWatcher = (step: Step) => number | null;

export type Advance =
	{ reached: 'end' | 'stop'; timeS: number } | { reached: 'failed'; failure: Failure; timeS: number };

const SHORTEST_STEP_S = 1e-9;
const SAFETY = 0.95;
/** A stop is where something bends: the first step after it takes this share of what was suggested. */
const AFTER_STOP = 0.35;
const LEAST_FACTOR = 0.15;
const MOST_FACTOR = 6;
/** Outside of these a temperature is not one of a vehicle. */
const ABSOLUTE_ZERO_C = -273.15;
const HOTTEST_C = 20_000;

/** Takes steps of a length that keeps each one within the tolerance. */
export class Integrator {
	readonly stepper: RosenbrockStepper;
	steps = 0;
	private tried = 0;
	private suggestedS = 1;

	constructor(
		system: HeatSystem,
		private readonly options: IntegratorOptions
	) {
		this.stepper = new RosenbrockStepper(system);
	}

	/** After a sudden change: suggests no more than this for the first step. */
	restart(firstStepS: number): void {
		this.suggestedS = Math.min(this.suggestedS, firstStepS);
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
	): Advance {
		const { stepper } = this;
		let now = timeS;
		this.suggestedS *= AFTER_STOP;
		while (now < endS) {
			const left = endS - now;
			stepper.prepare(now, temps, Math.min(left, this.suggestedS), now > timeS);
			const failure = this.takeStep(left);
			if (failure) return { reached: 'failed', failure, timeS: now };
			const stopAt = watch(stepper.step);
			if (stopAt !== null) {
				const length = stopAt * stepper.step.lengthS;
				if (length > SHORTEST_STEP_S) {
					if (!stepper.tryStep(length))
						return { reached: 'failed', failure: 'impossible_temperature', timeS: now };
					this.finishStep(temps, accept);
					now += length;
				}
				return { reached: 'stop', timeS: now };
			}
			const toEnd = stepper.step.lengthS >= left;
			now = toEnd ? endS : now + stepper.step.lengthS;
			this.finishStep(temps, accept);
		}
		return { reached: 'end', timeS: endS };
	}

	private finishStep(temps: Float64Array, accept: (step: Step) => void): void {
		temps.set(this.stepper.step.to);
		this.stepper.finish();
		this.steps++;
		accept(this.stepper.step);
	}

	/** Tries shorter and shorter steps until one is within the tolerance. */
	private takeStep(leftS: number): Failure | null {
		let length = this.fitLength(leftS);
		for (;;) {
			if (++this.tried > this.options.mostSteps) return 'too_many_steps';
			const error = this.stepper.tryStep(length) ? this.measureError() : Infinity;
			if (error <= 1) {
				const grown = length * Math.min(MOST_FACTOR, SAFETY * Math.max(error, 1e-8) ** -0.25);
				this.suggestedS = length < this.suggestedS ? Math.max(grown, this.suggestedS) : grown;
				return null;
			}
			const factor = Number.isFinite(error) ? Math.max(LEAST_FACTOR, SAFETY * error ** -0.25) : LEAST_FACTOR;
			length *= Math.min(factor, 0.9);
			this.suggestedS = length;
			if (length < SHORTEST_STEP_S)
				return Number.isFinite(error) ? 'step_too_small' : 'impossible_temperature';
		}
	}

	/** The suggested length, evened out so that no sliver is left before the end. */
	private fitLength(leftS: number): number {
		if (this.suggestedS >= leftS) return leftS;
		return this.suggestedS > leftS / 2 ? leftS / 2 : this.suggestedS;
	}

	/** Largest error in units of the tolerance; infinite when a temperature is impossible. */
	private measureError(): number {
		const { error, to } = this.stepper.step;
		const { toleranceK } = this.options;
		let largest = 0;
		for (let i = 0; i < error.length; i++) {
			if (!(to[i]! > ABSOLUTE_ZERO_C && to[i]! < HOTTEST_C)) return Infinity;
			const scaled = Math.abs(error[i]!) / toleranceK[i]!;
			if (!(scaled <= largest)) largest = scaled;
		}
		return Number.isNaN(largest) ? Infinity : largest;
	}
}
