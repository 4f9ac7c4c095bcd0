import { EngineInputError, requirePositive } from '../correlations/require';
import type { Columns } from './householder';

/** What is believed of a parameter before the data: its mean and standard deviation, in its own unit. */
export interface Prior {
	mean: number;
	sd: number;
}

/** Ends that a parameter may reach but not pass; leave one out where there is none. */
export interface Bounds {
	low?: number;
	high?: number;
}

export interface LeastSquaresProblem {
	/** Model minus data at these parameters: always as many numbers, in any unit. */
	residuals: (parameters: readonly number[]) => ArrayLike<number>;
	/** Where to begin, within the bounds. */
	start: readonly number[];
	/**
	 * 'standard deviations': each residual is divided by how uncertain its datum is, and the errors follow from that.
	 * 'own unit': the spread of the residuals themselves says how uncertain the data are.
	 */
	residualsIn: 'standard deviations' | 'own unit';
	/** One entry a parameter; null where nothing is believed. Needs residuals in standard deviations. */
	priors?: readonly (Prior | null)[];
	/** One entry a parameter; null where it is free. */
	bounds?: readonly (Bounds | null)[];
	/** Most evaluations of the residuals, those for derivatives included. */
	mostEvaluations?: number;
	/** Derivatives of the residuals, one column a parameter, where differences of them all would be waste; yields meanwhile. */
	derivatives?: (parameters: readonly number[]) => Generator<void, Columns>;
	/** How far each parameter may go in the first step; else as far as the start is from 0. */
	firstStep?: readonly number[];
	/** A fall of the sum of squares for which it is not worth going on; else only rounding ends the search. */
	leastFall?: number;
}

function requireFinite(values: Readonly<Record<string, number>>): void {
	for (const [input, value] of Object.entries(values)) {
		if (!Number.isFinite(value)) throw new EngineInputError(input, value, 'a finite number');
	}
}

function requireAsMany(name: string, list: readonly unknown[] | undefined, count: number): void {
	if (list !== undefined && list.length !== count) {
		throw new EngineInputError(`${name}.length`, list.length, `${count}, one for each parameter`);
	}
}

function requirePriors({ priors = [], residualsIn }: LeastSquaresProblem): void {
	priors.forEach((prior, k) => {
		if (prior === null) return;
		requireFinite({ [`priors[${k}].mean`]: prior.mean });
		requirePositive({ [`priors[${k}].sd`]: prior.sd });
	});
	const held = priors.filter((prior) => prior !== null).length;
	if (held > 0 && residualsIn === 'own unit') {
		throw new EngineInputError('priors', held, 'none where residuals are not in standard deviations');
	}
}

/** Refuses a problem that no fitting could make sense of. */
export function requireProblem(problem: LeastSquaresProblem): void {
	const { start, priors, bounds = [], mostEvaluations = 1 } = problem;
	if (start.length === 0) throw new EngineInputError('start.length', 0, 'at least 1');
	requireAsMany('priors', priors, start.length);
	requireAsMany('bounds', problem.bounds, start.length);
	requireAsMany('firstStep', problem.firstStep, start.length);
	requirePositive({ mostEvaluations });
	start.forEach((value, k) => {
		requireFinite({ [`start[${k}]`]: value });
		const { low = -Infinity, high = Infinity } = bounds[k] ?? {};
		if (!(low < high)) throw new EngineInputError(`bounds[${k}].low`, low, `below ${high}`);
		if (!(value >= low && value <= high)) {
			throw new EngineInputError(`start[${k}]`, value, `within ${low} to ${high}`);
		}
	});
	requirePriors(problem);
}

/** Residuals with those of the priors behind: (parameter − mean)/sd each. */
export function withPriors(problem: LeastSquaresProblem): (parameters: readonly number[]) => Float64Array {
	const { residuals, priors = [] } = problem;
	return (parameters) => {
		const believed = priors.flatMap((prior, k) =>
			prior === null ? [] : [(parameters[k]! - prior.mean) / prior.sd]
		);
		const data = residuals(parameters);
		const all = new Float64Array(data.length + believed.length);
		all.set(data);
		all.set(believed, data.length);
		return all;
	};
}
