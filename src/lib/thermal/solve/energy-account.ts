import type { HeatSystem } from './heat-system';
import { readStep, type RosenbrockStepper, type Step } from './rosenbrock';

/**
 * Adds up the heats along the curve between the steps and holds them against the heat that the nodes have stored.
 *
 * The heats are integrated on their own (Lobatto's rule on the dense output), so that a step too long, a wrong
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
		for (const [share, weight] of LOBATTO) {
			for (let i = 0; i < from.length; i++) this.temps[i] = readStep(step, i, share);
			this.stepper.evaluate(step.timeS + share * lengthS, this.temps, this.heats);
			system.sumThroughput(this.amounts);
			const weightS = weight * lengthS;
			for (let i = 0; i < from.length; i++) {
				this.gained[i] = this.gained[i]! + weightS * this.heats[i]!;
				this.passed[i] = this.passed[i]! + (weightS * this.amounts[i]!) / 2;
			}
		}
		for (let i = 0; i < from.length; i++) {
			this.stored[i] = this.stored[i]! + system.capacityJPerK[i]! * (to[i]! - from[i]!);
		}
	}

	/** |heat in − heat out − heat stored| of each node as a share of what passed through it. */
	relativeImbalances(): number[] {
		return Array.from(this.passed, (passed, i) =>
			passed > 0 ? Math.abs(this.gained[i]! - this.stored[i]!) / passed : 0
		);
	}
}

/** Places and weights of Lobatto's rule with four points, exact to the fifth degree. */
const INNER = Math.sqrt(1 / 5);
const LOBATTO = [
	[0, 1 / 12],
	[(1 - INNER) / 2, 5 / 12],
	[(1 + INNER) / 2, 5 / 12],
	[1, 1 / 12]
] as const;
