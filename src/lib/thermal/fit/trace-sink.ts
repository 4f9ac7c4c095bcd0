import { readStep, type Step } from '../solve/stepper';
import type { Standing, StepSink } from '../vehicle/step-sink';

/** Two instants nearer than this are one, s. */
const SAME_INSTANT_S = 1e-3;

/** Reads some nodes at given times of a run, in order. */
export class TraceSink implements StepSink {
	/** One row a node, NaN where the run did not come to. */
	rows: readonly Float64Array[] = [];
	private next = 0;
	private endS = 0;

	/**
	 * @param nodes places of the nodes in the solver's order
	 * @param timeS when, in order, s
	 */
	constructor(
		private readonly nodes: readonly number[],
		private readonly timeS: Float64Array
	) {}

	/** Begins a new run with rows of its own. */
	begin(): void {
		this.next = 0;
		this.endS = 0;
		this.rows = this.nodes.map(() => new Float64Array(this.timeS.length).fill(NaN));
	}

	takeStep(step: Step): void {
		const { timeS, nodes, rows } = this;
		this.endS = step.timeS + step.lengthS;
		for (; this.next < timeS.length && timeS[this.next]! < this.endS; this.next++) {
			const share = (timeS[this.next]! - step.timeS) / step.lengthS;
			for (let k = 0; k < nodes.length; k++) rows[k]![this.next] = readStep(step, nodes[k]!, share);
		}
	}

	takeEnd(temps: Float64Array, _standing: Standing, _minute: number): void {
		const at = this.next;
		if (at >= this.timeS.length || this.timeS[at]! > this.endS + SAME_INSTANT_S) return;
		for (let k = 0; k < this.nodes.length; k++) this.rows[k]![at] = temps[this.nodes[k]!]!;
	}
}
