import { finishWork } from '../uncertainty/finish-work';
import { findCovariance } from './covariance';
import { sumOfSquares } from './householder';
import { requireProblem, type LeastSquaresProblem } from './problem';
import { Search, type FitStatus } from './search';

export interface Fit {
	status: FitStatus;
	/** Best parameters found, whatever the status. */
	parameters: number[];
	/** Of the data alone, without the priors. */
	residualSumOfSquares: number;
	/** Of data and priors together: what was made least. */
	objective: number;
	/** Rows; zero for parameters at a bound. Null where the data do not tell the parameters apart. */
	covariance: number[][] | null;
	/** Null for a parameter at a bound, or where there is no covariance. */
	standardErrors: (number | null)[];
	atBound: boolean[];
	degreesOfFreedom: number;
	iterations: number;
	evaluations: number;
}

/** Covariance with zeros where a parameter sits at a bound. */
function spread(free: readonly number[], count: number, inner: number[][]): number[][] {
	return Array.from({ length: count }, (_, row) =>
		Array.from({ length: count }, (_entry, column) => {
			const [r, c] = [free.indexOf(row), free.indexOf(column)];
			return r < 0 || c < 0 ? 0 : inner[r]![c]!;
		})
	);
}

function describeFit(search: Search, status: FitStatus, problem: LeastSquaresProblem): Fit {
	const { parameters, residuals, count, bounds } = search;
	const believed = (problem.priors ?? []).filter((prior) => prior !== null).length;
	const data = residuals.subarray(0, residuals.length - believed);
	const atBound = parameters.map((value, k) => value === bounds[k]?.low || value === bounds[k]?.high);
	const free = parameters.flatMap((_, k) => (atBound[k] ? [] : [k]));
	const objective = sumOfSquares(residuals);
	const degreesOfFreedom = residuals.length - free.length;
	const scale = problem.residualsIn === 'own unit' ? objective / degreesOfFreedom : 1;
	const known = status !== 'not finite at the start' && Number.isFinite(scale);
	const jacobian = known ? search.differentiate() : [];
	const inner = known
		? findCovariance(
				free.map((at) => jacobian[at]!),
				scale
			)
		: null;
	const covariance = inner && spread(free, count, inner);
	return {
		status,
		parameters,
		residualSumOfSquares: sumOfSquares(data),
		objective,
		covariance,
		standardErrors: parameters.map((_, k) =>
			covariance && !atBound[k] ? Math.sqrt(covariance[k]![k]!) : null
		),
		atBound,
		degreesOfFreedom,
		iterations: search.iterations,
		evaluations: search.evaluations
	};
}

/**
 * Fits parameters to data by least squares, with what was believed before as further data.
 *
 *     min  Σ rᵢ(p)² + Σ ((pₖ − mₖ)/sₖ)²,   low ≤ p ≤ high
 *
 * Levenberg's and Marquardt's way in the form of a trust region: the linearised problem is solved within a radius that grows
 * while the model foretells well and shrinks when it does not. A parameter at a bound is held there while the sum of squares falls
 * only beyond.
 *
 * @param problem residuals, start, priors, bounds
 * @returns status, best parameters, sums of squares, covariance, standard errors; a numerical failure is a status, never thrown
 * @throws EngineInputError when start, bounds or priors contradict one another, or there are fewer residuals than parameters
 * Validity: smooth residuals; a minimum near the start is found, not the lowest of several. Standard errors hold where the residuals
 * are nearly straight over the errors themselves, and say nothing of a parameter at a bound.
 * Source: Levenberg (1944), Marquardt (1963), Moré, Lect. Notes Math. 630 (1978) 105; errors as in Seber and Wild (1989), 2.1.2.
 * @example
 * const line = [[0, 1], [1, 3], [2, 5]];
 * const residuals = ([a, b]) => line.map(([x, y]) => a + b * x - y);
 * fitLeastSquares({ residuals, start: [0, 0], residualsIn: 'own unit' }).parameters[1]; // 2.000000
 */
export function fitLeastSquares(problem: LeastSquaresProblem): Fit {
	requireProblem(problem);
	const search = new Search(problem);
	return describeFit(search, finishWork(search.run()), problem);
}
