import type { HeatSystem } from './heat-system';
import { factorise, planSparseLu, solveFactorised } from './sparse-lu';

/**
 * RODAS, a stiffly accurate and L-stable Rosenbrock method of order 4(3) with six stages.
 *
 * Source: Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., section VI.4 (coefficients of the
 * set with γ = 1/4, in the transformed variables that avoid products with the Jacobian).
 */
const GAMMA = 0.25;
const STAGE_TIME = [0, 0.386, 0.21, 0.63, 1, 1] as const;
const TIME_DERIVATIVE = [0.25, -0.1043, 0.1035, -0.03620000000000023, 0, 0] as const;
const A = [
	[],
	[1.544],
	[0.9466785280815826, 0.2557011698983284],
	[3.314825187068521, 2.896124015972201, 0.9986419139977817],
	[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
	[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1]
] as const;
const C = [
	[],
	[-5.6688],
	[-2.430093356833875, -0.2063599157091915],
	[-0.1073529058151375, -9.594562251023355, -20.47028614809616],
	[7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
	[8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054]
] as const;
/** Share of the step over which dH/dt is found: small against what bends, large against rounding. */
const TIME_SHARE = 1e-3;
/** The two inner coefficients of the cubic between the ends of a step. */
const DENSE = [
	[10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662],
	[-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872]
] as const;

export const STAGES = 6;

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

/** The temperature of one node inside a step, °C; `share` runs from 0 to 1. */
export function readStep(step: Step, node: number, share: number): number {
	const rest = 1 - share;
	return (
		step.from[node]! * rest +
		share * (step.to[node]! + rest * (step.inner2[node]! + share * step.inner3[node]!))
	);
}

/** Takes single steps of a heat system; says nothing about how long they should be. */
export class RosenbrockStepper {
	readonly step: Step;
	/** H at the start of the step that is tried. */
	readonly startHeats: Float64Array;
	/** H at the end of the step that was taken. */
	readonly endHeats: Float64Array;
	evaluations = 0;
	factorisations = 0;

	private readonly plan;
	private readonly jacobian: Float64Array;
	private readonly matrix: Float64Array;
	private readonly timeSlope: Float64Array;
	private readonly work: Float64Array;
	private readonly stages: Float64Array[];

	constructor(private system: HeatSystem) {
		const size = system.size;
		const vector = () => new Float64Array(size);
		this.plan = planSparseLu(size, system.pattern);
		this.jacobian = new Float64Array(size * size);
		this.matrix = new Float64Array(size * size);
		this.startHeats = vector();
		this.endHeats = vector();
		this.timeSlope = vector();
		this.work = vector();
		this.stages = Array.from({ length: STAGES }, vector);
		this.step = {
			timeS: 0,
			lengthS: 0,
			from: vector(),
			to: vector(),
			inner2: vector(),
			inner3: vector(),
			error: this.stages[STAGES - 1]!
		};
	}

	/** Goes over to another system of the same shape. */
	use(system: HeatSystem): void {
		this.system = system;
	}

	evaluate(timeS: number, temps: Float64Array, heats: Float64Array): void {
		this.system.setTime(timeS);
		this.system.sumHeats(temps, heats);
		this.evaluations++;
	}

	/**
	 * Takes up a new starting point.
	 *
	 * @param withinS about how long the step will be, s
	 * @param goesOn the point is the end of the last step and nothing has changed there: its heats are known
	 */
	prepare(timeS: number, temps: Float64Array, withinS: number, goesOn: boolean): void {
		const { system, step, startHeats, timeSlope, work } = this;
		step.timeS = timeS;
		step.from.set(temps);
		const delta = TIME_SHARE * withinS;
		this.evaluate(timeS + delta, step.from, work);
		if (goesOn) {
			startHeats.set(this.endHeats);
			system.setTime(timeS);
		} else {
			this.evaluate(timeS, step.from, startHeats);
		}
		for (let i = 0; i < system.size; i++) timeSlope[i] = (work[i]! - startHeats[i]!) / delta;
		system.fillJacobian(step.from, this.jacobian);
	}

	/** Works out H at the end of the step that was taken. */
	finish(): void {
		this.evaluate(this.step.timeS + this.step.lengthS, this.step.to, this.endHeats);
	}

	/** Tries one step of the length given from the point taken up; false when the matrix cannot be solved. */
	tryStep(lengthS: number): boolean {
		const { system, step, stages } = this;
		step.lengthS = lengthS;
		if (!this.buildMatrix(lengthS)) return false;
		for (let stage = 0; stage < STAGES; stage++) this.solveStage(stage, lengthS);
		const last = stages[STAGES - 1]!;
		for (let i = 0; i < system.size; i++) {
			step.to[i] = step.to[i]! + last[i]!;
			let inner2 = 0;
			let inner3 = 0;
			for (let k = 0; k < STAGES - 1; k++) {
				const value = stages[k]![i]!;
				inner2 += DENSE[0][k]! * value;
				inner3 += DENSE[1][k]! * value;
			}
			step.inner2[i] = inner2;
			step.inner3[i] = inner3;
		}
		return true;
	}

	private buildMatrix(lengthS: number): boolean {
		const { system, matrix, jacobian } = this;
		const size = system.size;
		for (let at = 0; at < matrix.length; at++) matrix[at] = -jacobian[at]!;
		const factor = 1 / (GAMMA * lengthS);
		for (let i = 0; i < size; i++) {
			const at = i * size + i;
			matrix[at] = matrix[at]! + system.capacityJPerK[i]! * factor;
		}
		this.factorisations++;
		return factorise(this.plan, matrix);
	}

	private solveStage(stage: number, lengthS: number): void {
		const { system, step, stages, startHeats, timeSlope } = this;
		const size = system.size;
		const result = stages[stage]!;
		const a = A[stage]!;
		const c = C[stage]!;
		if (stage === 0) {
			result.set(startHeats);
		} else {
			const temps = step.to;
			temps.set(step.from);
			for (let k = 0; k < stage; k++) {
				const weight = a[k]!;
				const other = stages[k]!;
				for (let i = 0; i < size; i++) temps[i] = temps[i]! + weight * other[i]!;
			}
			this.evaluate(step.timeS + STAGE_TIME[stage]! * lengthS, temps, result);
		}
		const slopeWeight = TIME_DERIVATIVE[stage]! * lengthS;
		for (let i = 0; i < size; i++) {
			let sum = 0;
			for (let k = 0; k < stage; k++) sum += c[k]! * stages[k]![i]!;
			result[i] = result[i]! + slopeWeight * timeSlope[i]! + (system.capacityJPerK[i]! * sum) / lengthS;
		}
		solveFactorised(this.plan, this.matrix, result);
	}
}
