import type { HeatSystem } from './heat-system';
import { factorise, planSparseLu, solveFactorised } from './sparse-lu';

/**
 * RODAS, a stiffly accurate and L-stable Rosenbrock method of order 4(3) with six stages.
 *
 * Source: Hairer, Wanner, Solving Ordinary Differential Equations II, 2nd ed., section VI.4 (coefficients of the
 * set with γ = 1/4, in the transformed variables that avoid products with the Jacobian).
 */
const GAMMA = 0.25;
const STAGE_TIME = Float64Array.of(0, 0.386, 0.21, 0.63, 1, 1);
const TIME_DERIVATIVE = Float64Array.of(0.25, -0.1043, 0.1035, -0.03620000000000023, 0, 0);
const A = [
	[],
	[1.544],
	[0.9466785280815826, 0.2557011698983284],
	[3.314825187068521, 2.896124015972201, 0.9986419139977817],
	[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895],
	[1.221224509226641, 6.019134481288629, 12.53708332932087, -0.687886036105895, 1]
].map((row) => Float64Array.from(row));
const C = [
	[],
	[-5.6688],
	[-2.430093356833875, -0.2063599157091915],
	[-0.1073529058151375, -9.594562251023355, -20.47028614809616],
	[7.496443313967647, -10.24680431464352, -33.99990352819905, 11.7089089320616],
	[8.083246795921522, -7.981132988064893, -31.52159432874371, 16.31930543123136, -6.058818238834054]
].map((row) => Float64Array.from(row));
/** Share of the step over which dH/dt is found: small against what bends, large against rounding. */
const TIME_SHARE = 1e-3;
/** The two inner coefficients of the cubic between the ends of a step. */
const DENSE = [
	[10.12623508344586, -7.487995877610167, -34.80091861555747, -7.992771707568823, 1.025137723295662],
	[-0.6762803392801253, 6.087714651680015, 16.43084320892478, 24.76722511418386, -6.594389125716872]
].map((row) => Float64Array.from(row));

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
	/** What the stages before have to do with the one that is solved, W. */
	private readonly coupling: Float64Array;
	/** The stages one after the other, each with one value a node. */
	private readonly stages: Float64Array;

	constructor(private readonly system: HeatSystem) {
		const size = system.size;
		const vector = () => new Float64Array(size);
		this.plan = planSparseLu(size, system.pattern);
		this.jacobian = new Float64Array(size * size);
		this.matrix = new Float64Array(size * size);
		this.startHeats = vector();
		this.endHeats = vector();
		this.timeSlope = vector();
		this.work = vector();
		this.coupling = vector();
		this.stages = new Float64Array(STAGES * size);
		this.step = {
			timeS: 0,
			lengthS: 0,
			from: vector(),
			to: vector(),
			inner2: vector(),
			inner3: vector(),
			error: this.stages.subarray((STAGES - 1) * size)
		};
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
		if (goesOn) {
			startHeats.set(this.endHeats);
		} else {
			this.evaluate(timeS, step.from, startHeats);
			system.fillJacobian(step.from, this.jacobian);
		}
		const delta = TIME_SHARE * withinS;
		this.evaluate(timeS + delta, step.from, work);
		for (let i = 0; i < system.size; i++) timeSlope[i] = (work[i]! - startHeats[i]!) / delta;
	}

	/** Works out H and its derivatives at the end of the step that was taken, where the next one may begin. */
	finish(): void {
		const { timeS, lengthS, to } = this.step;
		this.evaluate(timeS + lengthS, to, this.endHeats);
		this.system.fillJacobian(to, this.jacobian);
	}

	/** Tries one step of the length given from the point taken up; false when the matrix cannot be solved. */
	tryStep(lengthS: number): boolean {
		const { system, step, stages } = this;
		const { size } = system;
		const [dense2, dense3] = DENSE as [Float64Array, Float64Array];
		step.lengthS = lengthS;
		if (!this.buildMatrix(lengthS)) return false;
		for (let stage = 0; stage < STAGES; stage++) this.solveStage(stage, lengthS);
		for (let i = 0; i < size; i++) {
			let inner2 = 0;
			let inner3 = 0;
			for (let k = 0, at = i; k < STAGES - 1; k++, at += size) {
				const value = stages[at]!;
				inner2 += dense2[k]! * value;
				inner3 += dense3[k]! * value;
			}
			step.to[i] = step.to[i]! + step.error[i]!;
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
		const { step, stages, startHeats, work, timeSlope, coupling } = this;
		const { size } = this.system;
		let heats = startHeats;
		if (stage > 0) {
			this.combineStages(stage, lengthS);
			heats = work;
			this.evaluate(step.timeS + STAGE_TIME[stage]! * lengthS, step.to, heats);
		}
		const slopeWeight = TIME_DERIVATIVE[stage]! * lengthS;
		const offset = stage * size;
		for (let i = 0; i < size; i++) {
			const coupled = stage > 0 ? coupling[i]! : 0;
			stages[offset + i] = heats[i]! + slopeWeight * timeSlope[i]! + coupled;
		}
		solveFactorised(this.plan, this.matrix, stages, offset);
	}

	/** Where the stage looks, into step.to, and what the ones before add to it, into coupling. */
	private combineStages(stage: number, lengthS: number): void {
		const { step, stages, coupling } = this;
		const { size, capacityJPerK } = this.system;
		const { from, to } = step;
		const a = A[stage]!;
		const c = C[stage]!;
		const perS = 1 / lengthS;
		for (let i = 0; i < size; i++) {
			let temp = from[i]!;
			let sum = 0;
			for (let k = 0, at = i; k < stage; k++, at += size) {
				const value = stages[at]!;
				temp += a[k]! * value;
				sum += c[k]! * value;
			}
			to[i] = temp;
			coupling[i] = capacityJPerK[i]! * sum * perS;
		}
	}
}
