import type { HeatSystem } from './heat-system';
import { RODAS, STAGES } from './rodas';
import { factorise, planSparseLu, solveFactorised } from './sparse-lu';
import type { Step, Stepper } from './stepper';

const GAMMA = RODAS.gamma;
const A = RODAS.a.map((row) => Float64Array.from(row));
const C = RODAS.c.map((row) => Float64Array.from(row));
const DENSE = RODAS.dense.map((row) => Float64Array.from(row));
/** Share of the step over which dH/dt is found: small against what bends, large against rounding. */
const TIME_SHARE = 1e-3;

/** RODAS for any heat system. */
export class RosenbrockStepper implements Stepper {
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
			this.evaluate(step.timeS + RODAS.times[stage]! * lengthS, step.to, heats);
		}
		const slopeWeight = RODAS.timeDerivative[stage]! * lengthS;
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
