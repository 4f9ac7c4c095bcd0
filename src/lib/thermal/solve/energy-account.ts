import type { HeatSystem } from './heat-system';
import type { RosenbrockStepper } from './rosenbrock';
import { readStep, type Step } from './stepper';

/** Simpson's rule, exact to the third degree, as the curve inside a step is: both ends with 1/6 each, the middle 2/3. */
const END_WEIGHT = 1 / 6;
const MIDDLE_WEIGHT = 2 / 3;

/** What passes through a node counts at least as much as would warm it by this: below there is only rounding. */
const LEAST_PASSED_K = 1e-2;

/**
 * Adds up the heats along the curve between the steps and holds them against the heat that the nodes have stored.
 *
 * The heats are integrated on their own (Simpson's rule on the dense output), so that a step too long, a wrong
 * derivative or a heat that is given but not taken shows as an imbalance.
 */
export class EnergyAccount {
	private readonly gained: Float64Array;
	private readonly stored: Float64Array;
	private readonly passed: Float64Array;
	private readonly temps: Float64Array;
	private readonly heats: Float64Array;
	private readonly amounts: Float64Array;

	constructor(
		size: number,
		private readonly stepper: RosenbrockStepper
	) {
		const vector = () => new Float64Array(size);
		this.gained = vector();
		this.stored = vector();
		this.passed = vector();
		this.temps = vector();
		this.heats = vector();
		this.amounts = vector();
	}

	/** Books one step that the system has taken. */
	book(step: Step, system: HeatSystem): void {
		const { lengthS, from, to } = step;
		const { gained, stored, passed, temps, heats, amounts } = this;
		const { startHeats, endHeats } = this.stepper;
		const endWeightS = END_WEIGHT * lengthS;
		for (let i = 0; i < from.length; i++) {
			gained[i] = gained[i]! + endWeightS * (startHeats[i]! + endHeats[i]!);
			stored[i] = stored[i]! + system.capacityJPerK[i]! * (to[i]! - from[i]!);
		}
		for (let i = 0; i < from.length; i++) temps[i] = readStep(step, i, 0.5);
		this.stepper.evaluate(step.timeS + 0.5 * lengthS, temps, heats);
		system.sumThroughput(amounts);
		for (let i = 0; i < from.length; i++) {
			gained[i] = gained[i]! + MIDDLE_WEIGHT * lengthS * heats[i]!;
			// What comes in is counted, and what goes out: half of both has passed.
			passed[i] = passed[i]! + (lengthS * amounts[i]!) / 2;
		}
	}

	/** |heat in − heat out − heat stored| of each node as a share of what passed through it. */
	relativeImbalances(system: HeatSystem): number[] {
		return Array.from(this.passed, (passed, i) => {
			const least = LEAST_PASSED_K * system.capacityJPerK[i]!;
			return Math.abs(this.gained[i]! - this.stored[i]!) / Math.max(passed, least);
		});
	}
}
