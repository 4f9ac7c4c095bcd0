import { STATE_ROWS } from '../network/step-generator/generate-step';
import { STAGES } from '../solve/rodas';
import type { Step, Stepper } from '../solve/stepper';
import { DriveClock } from './drive-clock';
import { stepBare, stepShielded } from './generated/vehicle-steps';
import type { Setting } from './network-table';
import { planFilling, shapeVehicle } from './vehicle-shape';

/** The two shapes that a vehicle's network has. */
const VARIANTS = {
	bare: { names: shapeVehicle(false).stored, filling: planFilling(false), take: stepBare },
	shielded: { names: shapeVehicle(true).stored, filling: planFilling(true), take: stepShielded }
};
/** What passes through a node counts at least as much as would warm it by this: below there is only rounding. */
const LEAST_PASSED_K = 1e-2;

/** Takes the steps of a vehicle's network with the code that was generated for its shape. */
export class VehicleStepper implements Stepper {
	readonly step: Step;
	readonly names: readonly string[];
	readonly clock = new DriveClock();
	evaluations = 0;
	private readonly variant;
	private readonly constants: Float64Array;
	private readonly state: Float64Array;
	/** Of the step that was tried last, J. */
	private readonly gainedInStep: Float64Array;
	private readonly passedInStep: Float64Array;
	/** Gained less stored, and passed, since the run began, J. */
	private readonly lost: Float64Array;
	private readonly passed: Float64Array;

	/** @param account whether to sum the heats, for `relativeImbalance` */
	constructor(
		shielded: boolean,
		private readonly account: boolean
	) {
		this.variant = shielded ? VARIANTS.shielded : VARIANTS.bare;
		this.names = this.variant.names;
		const size = this.names.length;
		this.constants = new Float64Array(this.variant.filling.size);
		this.state = new Float64Array(STATE_ROWS.length * size);
		this.lost = new Float64Array(size);
		this.passed = new Float64Array(size);
		const row = (name: (typeof STATE_ROWS)[number]) => {
			const at = STATE_ROWS.indexOf(name);
			return this.state.subarray(at * size, (at + 1) * size);
		};
		this.step = {
			timeS: 0,
			lengthS: 0,
			from: row('from'),
			to: row('to'),
			inner2: row('inner2'),
			inner3: row('inner3'),
			error: row('error')
		};
		this.gainedInStep = row('gained');
		this.passedInStep = row('passed');
	}

	/** Begins a new run. */
	reset(): void {
		this.evaluations = 0;
		this.lost.fill(0);
		this.passed.fill(0);
	}

	/** From `timeS` on this leg runs. */
	startLeg(setting: Setting, timeS: number): void {
		this.variant.filling.fill(this.constants, setting);
		this.clock.startLeg(setting, timeS);
	}

	prepare(timeS: number, temps: Float64Array): void {
		const { from } = this.step;
		this.step.timeS = timeS;
		for (let i = 0; i < from.length; i++) from[i] = temps[i]!;
		this.clock.fillStart(timeS);
	}

	tryStep(lengthS: number): boolean {
		this.step.lengthS = lengthS;
		this.clock.fillStages(lengthS);
		this.variant.take(this.constants, this.clock.values, this.state, this.account);
		this.evaluations += STAGES;
		return true;
	}

	finish(): void {
		if (!this.account) return;
		const { from, to } = this.step;
		for (let i = 0; i < from.length; i++) {
			const stored = this.constants[i]! * (to[i]! - from[i]!);
			this.lost[i] = this.lost[i]! + (this.gainedInStep[i]! - stored);
			this.passed[i] = this.passed[i]! + this.passedInStep[i]!;
		}
	}

	/** Largest |heat in − heat out − heat stored| of a node as a share of what passed through it. */
	relativeImbalance(): number {
		let largest = 0;
		for (let i = 0; i < this.lost.length; i++) {
			const passed = Math.max(this.passed[i]!, LEAST_PASSED_K * this.constants[i]!);
			largest = Math.max(largest, Math.abs(this.lost[i]!) / passed);
		}
		return largest;
	}
}
