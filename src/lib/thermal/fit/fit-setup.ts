import { EngineInputError } from '../correlations/require';
import type { Scenario } from '../types';
import { listBlocks, markLegs, type Block } from './blocks';
import { readCoefficients, type Coefficient, type FittedCoefficient } from './coefficients';
import type { Asked } from './information';
import { requireStart, type UnmeasuredStart } from './start-temps';
import { FIT_CHANNELS, requireTrace, type FitChannel, type FitTrace } from './trace';
import { TraceModel, type TraceOfScenario } from './trace-model';
import { TraceProblem } from './trace-problem';

/** A trace to be fitted, with the scenario whose legs are those that were driven. */
export interface TraceToFit {
	trace: FitTrace;
	/** Vehicle, mount, battery, climate and legs; the trace says at what hour it starts. */
	scenario: Scenario;
	/** Of nodes of which nothing was measured; the outside air unless said otherwise. */
	start?: UnmeasuredStart;
	/** Legs, counted from 0, that are kept back to test the fit with. */
	heldOutLegs?: readonly number[];
}

function requireHeldOut({ scenario, heldOutLegs = [] }: TraceToFit, path: string): void {
	const { length } = scenario.legs;
	heldOutLegs.forEach((leg, at) => {
		if (Number.isInteger(leg) && leg >= 0 && leg < length) return;
		throw new EngineInputError(`${path}.heldOutLegs[${at}]`, leg, `a leg, 0 to ${length - 1}`);
	});
}

function requireGroups(coefficients: readonly Coefficient[], traces: readonly TraceToFit[]): void {
	coefficients.forEach(({ group, key }, at) => {
		if (traces.some(({ scenario }) => scenario[group] !== null)) return;
		throw new EngineInputError(`coefficients[${at}] ${group}.${key}`, NaN, 'of a group that a scenario has');
	});
}

/** Everything about a fit that stays the same while it is made. */
export class FitSetup {
	readonly coefficients: readonly Coefficient[];
	readonly models: readonly TraceModel[];
	private readonly traces: readonly (TraceOfScenario & { heldOut: Uint8Array; fitted: Uint8Array })[];

	constructor(given: readonly TraceToFit[], wanted: readonly FittedCoefficient[]) {
		if (given.length === 0) throw new EngineInputError('traces.length', 0, 'at least 1');
		this.coefficients = readCoefficients(wanted);
		given.forEach((each, at) => {
			requireTrace(each.trace, `traces[${at}].trace`);
			requireStart(each.start ?? { kind: 'air' }, `traces[${at}].start`);
			requireHeldOut(each, `traces[${at}]`);
		});
		requireGroups(this.coefficients, given);
		this.traces = given.map(({ trace, scenario, start = { kind: 'air' }, heldOutLegs = [] }) => {
			const of = { trace, scenario, start };
			const within = markLegs(of, [...scenario.legs.keys()]);
			const heldOut = markLegs(of, heldOutLegs);
			return { ...of, heldOut, fitted: within.map((inside, at) => inside & (1 - heldOut[at]!)) };
		});
		this.models = this.traces.map((of) => new TraceModel(of, this.coefficients));
		this.traces.forEach((_, at) => {
			if (this.blocksOf([at], 'fitted').length > 0) return;
			throw new EngineInputError(`traces[${at}].trace`, 0, 'with readings within the legs that are fitted');
		});
	}

	get all(): number[] {
		return [...this.traces.keys()];
	}

	traceAt(at: number): TraceOfScenario {
		return this.traces[at]!;
	}

	/** Readings of some of the traces; in blocks these are counted anew, from 0. */
	blocksOf(traces: readonly number[], which: 'fitted' | 'heldOut'): Block[] {
		return traces.flatMap((trace, at) => listBlocks(this.traces[trace]!, at, this.traces[trace]![which]));
	}

	/** The readings that a channel would have given in a trace, had it been measured; none where the run has no such node. */
	wouldRead(trace: number, channel: FitChannel): Asked[] {
		const model = this.models[trace]!;
		if (!model.foretells(channel)) return [];
		const row = FIT_CHANNELS.filter((each) => model.foretells(each)).indexOf(channel);
		const { fitted } = this.traces[trace]!;
		return [
			{ trace, channel, row, at: Int32Array.from([...fitted.keys()].filter((at) => fitted[at] === 1)) }
		];
	}

	/** The problem of fitting some of the traces. */
	problemOf(traces: readonly number[]): TraceProblem {
		const models = traces.map((trace) => this.models[trace]!);
		return new TraceProblem(models, this.coefficients, this.blocksOf(traces, 'fitted'));
	}

	/** The problem of the start temperatures alone, with the coefficients held. */
	startsProblemOf(held: readonly (number | null)[]): TraceProblem {
		return new TraceProblem(this.models, [], this.blocksOf(this.all, 'fitted'), held);
	}
}
