import type { Coefficient } from './coefficients';
import { valueAt } from './coefficients';
import type { Block } from './blocks';
import type { Columns } from './householder';
import { residualsOf, type Noises } from './noise';
import type { LeastSquaresProblem } from './problem';
import type { Loss } from './robust-loss';
import type { TraceModel } from './trace-model';

/** Derivatives are taken over this much of a coefficient's prior, in standard deviations: well above the errors of a run. */
const COEFFICIENT_STEP = 0.1;
/** And over this much of a start temperature's. */
const START_STEP = 1;
/** Derivatives are used again where no parameter is further off than this: they are good to a few hundredths. */
const REUSED_WITHIN = 0.03;
/** The first step may go this far, in standard deviations of the priors. */
const FIRST_STEP = 1;
/** The search ends where the sum of squares would fall by less: a thirtieth of a standard deviation. */
const LEAST_FALL = 1e-3;
const MOST_EVALUATIONS = 3000;

/** What the model foretells of each trace: rows as TraceModel gives them. */
export type Foretold = readonly (readonly Float64Array[])[];
/** Change of what is foretold with each parameter, K per standard deviation of its prior; null where it has none. */
export type Sensitivities = readonly (readonly (readonly Float64Array[] | null)[])[];

/** Traces and coefficients as a problem of least squares: parameters in standard deviations of their priors. */
export class TraceProblem {
	readonly count: number;
	/** First parameter of each trace's start temperatures. */
	private readonly startsFrom: number[] = [];
	private last: { key: string; foretold: Foretold } | null = null;
	private known: { at: readonly number[]; sensitivities: Sensitivities } | null = null;

	constructor(
		readonly models: readonly TraceModel[],
		readonly coefficients: readonly Coefficient[],
		readonly blocks: readonly Block[],
		/** Values of the models' coefficients that stay as they are, where none is to be found. */
		private readonly held: readonly (number | null)[] | null = null
	) {
		let from = coefficients.length;
		for (const { starts } of models) {
			this.startsFrom.push(from);
			from += starts.length;
		}
		this.count = from;
	}

	/** The middle of every prior, as near as the bounds allow. */
	middle(): number[] {
		const coefficients = this.coefficients.map(({ lowZ, highZ }) => Math.min(Math.max(0, lowZ), highZ));
		return [...coefficients, ...new Array<number>(this.count - coefficients.length).fill(0)];
	}

	/** The coefficients in their own units. */
	valuesAt(parameters: readonly number[]): number[] {
		return this.coefficients.map(({ prior, low, high }, at) =>
			Math.min(Math.max(valueAt(prior, parameters[at]!), low), high)
		);
	}

	/** The start temperatures of a trace, °C. */
	startsAt(parameters: readonly number[], trace: number): number[] {
		const from = this.startsFrom[trace]!;
		return this.models[trace]!.starts.map(({ mean, sd }, at) => mean + sd * parameters[from + at]!);
	}

	foretell(parameters: readonly number[]): Foretold {
		const key = parameters.join();
		if (this.last?.key === key) return this.last.foretold;
		const foretold = this.models.map((_, trace) => this.foretellTrace(trace, parameters));
		this.last = { key, foretold };
		return foretold;
	}

	residuals(parameters: readonly number[]): Float64Array[] {
		const foretold = this.foretell(parameters);
		return this.blocks.map((block) => residualsOf(block, foretold[block.trace]!));
	}

	/** By parameter and trace, at these parameters or as near to them that it makes no difference; yields after each trace. */
	*findSensitivities(parameters: readonly number[]): Generator<void, Sensitivities> {
		if (this.known?.at.every((value, at) => Math.abs(value - parameters[at]!) <= REUSED_WITHIN)) {
			return this.known.sensitivities;
		}
		const sensitivities = yield* this.tryEach(parameters);
		this.known = { at: [...parameters], sensitivities };
		return sensitivities;
	}

	private *tryEach(parameters: readonly number[]): Generator<void, Sensitivities> {
		const foretold = this.foretell(parameters);
		const found: (readonly Float64Array[] | null)[][] = [];
		for (let at = 0; at < this.count; at++) {
			const [below, above] = this.stepsAround(parameters[at]!, at);
			const move = (to: number) => parameters.map((old, k) => (k === at ? to : old));
			const rows: (readonly Float64Array[] | null)[] = [];
			for (let trace = 0; trace < this.models.length; trace++) {
				if (!this.isFelt(at, trace)) {
					rows.push(null);
					continue;
				}
				const low = below === parameters[at] ? foretold[trace]! : this.foretellTrace(trace, move(below));
				const high = this.foretellTrace(trace, move(above));
				rows.push(
					high.map((row, k) => row.map((value, place) => (value - low[k]![place]!) / (above - below)))
				);
				yield;
			}
			found.push(rows);
		}
		return found;
	}

	/** The problem that least squares solves with these noises. */
	toLeastSquares(start: readonly number[], noises: Noises, loss: Loss): LeastSquaresProblem {
		const each = <T>(of: (at: number) => T) => Array.from({ length: this.count }, (_, at) => of(at));
		return {
			residuals: (parameters) => this.weigh(this.residuals(parameters), noises, loss),
			derivatives: (parameters) => this.differentiate(parameters, noises, loss),
			start,
			residualsIn: 'standard deviations',
			priors: each(() => ({ mean: 0, sd: 1 })),
			bounds: each((at) => {
				const { lowZ, highZ } = this.coefficients[at] ?? {};
				return lowZ === undefined || highZ === undefined ? null : { low: lowZ, high: highZ };
			}),
			firstStep: each(() => FIRST_STEP),
			leastFall: LEAST_FALL,
			mostEvaluations: MOST_EVALUATIONS
		};
	}

	/** Coefficients are felt in all traces, a start temperature in its own. */
	private isFelt(parameter: number, trace: number): boolean {
		const from = this.startsFrom[trace]!;
		return (
			parameter < this.coefficients.length ||
			(parameter >= from && parameter < from + this.models[trace]!.starts.length)
		);
	}

	private foretellTrace(trace: number, parameters: readonly number[]): readonly Float64Array[] {
		const values = this.held ?? this.valuesAt(parameters);
		return this.models[trace]!.predict(values, this.startsAt(parameters, trace));
	}

	/** To both sides for a coefficient, as far as its bounds go; start temperatures are felt in so straight a line that one side does. */
	private stepsAround(value: number, parameter: number): readonly [number, number] {
		const coefficient = this.coefficients[parameter];
		if (!coefficient) return [value, value + START_STEP];
		const { lowZ, highZ } = coefficient;
		return [Math.max(value - COEFFICIENT_STEP, lowZ), Math.min(value + COEFFICIENT_STEP, highZ)];
	}

	private weigh(residuals: readonly Float64Array[], noises: Noises, loss: Loss): Float64Array {
		const all = new Float64Array(this.blocks.reduce((sum, { at }) => sum + at.length, 0));
		let next = 0;
		this.blocks.forEach(({ channel, at }, block) => {
			const { sdK, weight } = noises[channel]!;
			const root = Math.sqrt(weight);
			for (const place of at) all[next++] = root * loss.root(residuals[block]![place]! / sdK);
		});
		return all;
	}

	private *differentiate(
		parameters: readonly number[],
		noises: Noises,
		loss: Loss
	): Generator<void, Columns> {
		const slopes = this.residuals(parameters).map((values, block) => {
			const { sdK, weight } = noises[this.blocks[block]!.channel]!;
			const factor = Math.sqrt(weight) / sdK;
			return values.map((value) => factor * loss.rootSlope(value / sdK));
		});
		const sensitivities = yield* this.findSensitivities(parameters);
		return sensitivities.map((byTrace) => this.layOut(byTrace, slopes));
	}

	private layOut(
		byTrace: readonly (readonly Float64Array[] | null)[],
		slopes: readonly Float64Array[]
	): Float64Array {
		const column = new Float64Array(this.blocks.reduce((sum, { at }) => sum + at.length, 0));
		let next = 0;
		this.blocks.forEach(({ trace, row, at }, block) => {
			const rows = byTrace[trace];
			for (const place of at) column[next++] = rows ? slopes[block]![place]! * rows[row]![place]! : 0;
		});
		return column;
	}
}
