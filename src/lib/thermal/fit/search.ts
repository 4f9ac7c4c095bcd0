import { EngineInputError } from '../correlations/require';
import { norm, sumOfSquares, triangularise, type Columns } from './householder';
import { clamp, differentiate } from './jacobian';
import { withPriors, type Bounds, type LeastSquaresProblem } from './problem';
import { findTrustStep } from './trust-step';

export type FitStatus = 'converged' | 'evaluations used up' | 'stalled' | 'not finite at the start';

const MOST_EVALUATIONS = 20_000;
/** Relative lowering of the sum of squares, done and foreseen, below which nothing is left to gain. */
const LEAST_GAIN = 1e-14;
/** Relative length of the radius below which no parameter moves. */
const LEAST_MOVE = 1e-12;
/** Cosine between residuals and each column of the Jacobian below which they count as perpendicular. */
const LEAST_COSINE = 1e-10;
/** A step is taken from this share of the gain that was foreseen. */
const ENOUGH = 1e-4;
/** The first step may be as long as the parameters themselves, in their scales: longer ones lose some starts for good. */
const FIRST_RADIUS = 1;

const allFinite = (values: Float64Array): boolean => values.every(Number.isFinite);

/** One run of the search: what it knows while it goes on. */
export class Search {
	readonly bounds: (Bounds | null)[];
	readonly count: number;
	evaluations = 0;
	iterations = 0;
	parameters: number[];
	residuals: Float64Array;
	private scales: Float64Array;
	private radius = 0;
	private readonly evaluateAll: (parameters: readonly number[]) => Float64Array;
	private readonly mostEvaluations: number;
	private readonly leastFall: number;

	constructor(private readonly problem: LeastSquaresProblem) {
		this.parameters = [...problem.start];
		this.count = this.parameters.length;
		this.bounds = this.parameters.map((_, k) => problem.bounds?.[k] ?? null);
		this.mostEvaluations = problem.mostEvaluations ?? MOST_EVALUATIONS;
		this.leastFall = problem.leastFall ?? -Infinity;
		this.evaluateAll = withPriors(problem);
		this.scales = new Float64Array(this.count);
		this.residuals = this.evaluate(this.parameters);
		if (this.residuals.length < this.count) {
			throw new EngineInputError(
				'residuals.length',
				this.residuals.length,
				`at least ${this.count}, one a parameter`
			);
		}
	}

	readonly evaluate = (parameters: readonly number[]): Float64Array => {
		this.evaluations++;
		return this.evaluateAll(parameters);
	};

	/** Those of the residuals, with the rows of the priors behind where the problem knows its own. */
	private *findJacobian(): Generator<void, Columns> {
		const { derivatives, priors = [] } = this.problem;
		if (!derivatives) return this.differentiate();
		const columns = yield* derivatives(this.parameters);
		const believed = priors.flatMap((prior, at) => (prior === null ? [] : [{ at, slope: 1 / prior.sd }]));
		return columns.map((column, at) => {
			const tall = new Float64Array(column.length + believed.length);
			tall.set(column);
			believed.forEach((row, k) => {
				if (row.at === at) tall[column.length + k] = row.slope;
			});
			return tall;
		});
	}

	differentiate(): Columns {
		const sizes = this.parameters.map((_, k) => this.problem.priors?.[k]?.sd ?? 1);
		return differentiate(this.evaluate, this.parameters, sizes, this.bounds);
	}

	/** At an end, and the sum of squares falls only beyond it. */
	isHeld(column: Float64Array, at: number): boolean {
		const value = this.parameters[at]!;
		const { low = -Infinity, high = Infinity } = this.bounds[at] ?? {};
		const rise = column.reduce((sum, slope, k) => sum + slope * this.residuals[k]!, 0);
		return (value === low && rise > 0) || (value === high && rise < 0);
	}

	/** Yields whenever some of the work is done. */
	*run(): Generator<void, FitStatus> {
		if (!allFinite(this.residuals)) return 'not finite at the start';
		for (;;) {
			if (norm(this.residuals) === 0) return 'converged';
			const jacobian = yield* this.findJacobian();
			if (!jacobian.every(allFinite)) return 'stalled';
			const free = jacobian.flatMap((column, at) => (this.isHeld(column, at) ? [] : [at]));
			if (this.isPerpendicular(free.map((at) => jacobian[at]!))) return 'converged';
			this.updateScales(jacobian);
			const end = yield* this.findBetter(jacobian, free);
			this.iterations++;
			if (end !== null) return end;
		}
	}

	private isPerpendicular(columns: Columns): boolean {
		const length = norm(this.residuals);
		return columns.every((column) => {
			const product = column.reduce((sum, slope, k) => sum + slope * this.residuals[k]!, 0);
			return Math.abs(product) <= LEAST_COSINE * norm(column) * length;
		});
	}

	/** Scales only grow, so that a parameter without effect for a while does not run away. */
	private updateScales(jacobian: Columns): void {
		const first = this.iterations === 0;
		this.scales = Float64Array.from(jacobian, (column, at) =>
			first ? norm(column) || 1 : Math.max(this.scales[at]!, norm(column))
		);
		const { firstStep = this.parameters } = this.problem;
		if (first) this.radius = FIRST_RADIUS * (this.scaledLength(firstStep) || 1);
	}

	private scaledLength(values: readonly number[]): number {
		return Math.hypot(...values.map((value, k) => value * this.scales[k]!));
	}

	/** Shortens the step until the sum of squares falls; null when the search goes on from there. */
	private *findBetter(jacobian: Columns, free: readonly number[]): Generator<void, FitStatus | null> {
		const turned = this.residuals.map((residual) => -residual);
		const triangle = triangularise(
			free.map((at) => jacobian[at]!),
			turned
		);
		const scales = Float64Array.from(free, (at) => this.scales[at]!);
		for (;;) {
			if (this.evaluations >= this.mostEvaluations) return 'evaluations used up';
			const { step, damping } = findTrustStep(triangle, scales, this.radius);
			const end = this.tryStep(jacobian, free, step, damping);
			yield;
			if (end !== 'shorter') return end;
		}
	}

	private tryStep(
		jacobian: Columns,
		free: readonly number[],
		step: Float64Array,
		damping: number
	): FitStatus | 'shorter' | null {
		const next = [...this.parameters];
		free.forEach((at, k) => (next[at] = clamp(next[at]! + step[k]!, this.bounds[at])));
		const move = next.map((value, k) => value - this.parameters[k]!);
		const length = this.scaledLength(move);
		const before = sumOfSquares(this.residuals);
		const linear = this.residuals.map((residual, row) =>
			move.reduce((sum, change, k) => sum + jacobian[k]![row]! * change, residual)
		);
		const foreseen = 1 - sumOfSquares(linear) / before;
		const residuals = this.evaluate(next);
		const after = allFinite(residuals) ? sumOfSquares(residuals) : Infinity;
		const gained = 1 - after / before;
		const share = foreseen > 0 ? gained / foreseen : -1;
		this.updateRadius(share, length, damping);
		const taken = share >= ENOUGH;
		if (taken) {
			this.parameters = next;
			this.residuals = residuals;
		}
		if (foreseen * before <= this.leastFall) return 'converged';
		if (Math.abs(gained) <= LEAST_GAIN && foreseen <= LEAST_GAIN && share <= 2) return 'converged';
		if (this.radius <= LEAST_MOVE * this.scaledLength(this.parameters))
			return taken ? 'converged' : this.judgeRest(foreseen);
		return taken ? null : 'shorter';
	}

	/** The radius is spent: at rest when hardly anything could be gained, stalled when much was promised and never came. */
	private judgeRest(foreseen: number): FitStatus {
		return foreseen <= 1e-8 ? 'converged' : 'stalled';
	}

	private updateRadius(share: number, length: number, damping: number): void {
		if (share <= 0.25) this.radius = Math.min(this.radius, length / 0.1) * (share > 0 ? 0.5 : 0.25);
		else if (damping === 0 || share >= 0.75) this.radius = 2 * length;
	}
}
