import { EngineInputError } from '../correlations/require';
import { planSensitivity, type SensitivityOptions, type SensitivityPlan } from './sensitivity-plan';

/** An estimate and its standard error, from the spread between replicates. */
export interface Estimate {
	value: number;
	standardError: number;
}

export interface SensitivityResult {
	mean: Estimate;
	variance: Estimate;
	/** Share of the variance that each input makes alone; 0 where nothing varies. */
	firstOrder: Estimate[];
	/** Share that would go if the input were known, with all that it does together with others. */
	totalEffect: Estimate[];
	evaluations: number;
}

/** Mean, variance and the parts of the variance, of one replicate. */
interface Parts {
	mean: number;
	variance: number;
	first: number[];
	total: number[];
}

function meanOf(values: readonly number[]): number {
	return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function estimateParts(rows: readonly (readonly number[])[], dimensions: number): Parts {
	const mean = meanOf(rows.flatMap(([a = 0, b = 0]) => [a, b]));
	const average = (term: (row: readonly number[]) => number): number => meanOf(rows.map(term));
	const inputs = Array.from({ length: dimensions }, (_, input) => input + 2);
	return {
		mean,
		variance: average(([a = 0, b = 0]) => ((a - mean) ** 2 + (b - mean) ** 2) / 2),
		// What A and AB have in common is taken off B first, which makes the product steadier.
		first: inputs.map((at) => average((row) => (row[1]! - mean) * (row[at]! - row[0]!))),
		total: inputs.map((at) => average((row) => (row[0]! - row[at]!) ** 2 / 2))
	};
}

/** The pooled value, and how far replicates of it lie apart. */
function estimate(value: number, replicates: readonly number[]): Estimate {
	const middle = meanOf(replicates);
	const squares = replicates.reduce((sum, each) => sum + (each - middle) ** 2, 0);
	return { value, standardError: Math.sqrt(squares / (replicates.length * (replicates.length - 1))) };
}

const ratio = (part: number, whole: number): number => (whole > 0 ? part / whole : 0);

/** Shares of the variance: sums of all replicates divided, never the mean of quotients. */
function estimateShares(replicates: readonly Parts[], read: (parts: Parts) => readonly number[]): Estimate[] {
	const variance = meanOf(replicates.map((parts) => parts.variance));
	return read(replicates[0]!).map((_, input) => {
		const each = replicates.map((parts) => ratio(read(parts)[input]!, parts.variance));
		return estimate(ratio(meanOf(replicates.map((parts) => read(parts)[input]!)), variance), each);
	});
}

function requireValues(values: ArrayLike<number>, count: number): void {
	if (values.length !== count) throw new EngineInputError('values.length', values.length, `${count}`);
	for (let k = 0; k < count; k++) {
		if (!Number.isFinite(values[k]))
			throw new EngineInputError(`values[${k}]`, values[k]!, 'a finite number');
	}
}

/**
 * Reads first-order and total-effect indices from the values of a model at the points of a plan.
 *
 *     Sᵢ = mean[ (f(B) − f̄)(f(ABᵢ) − f(A)) ] / V,     STᵢ = ½ mean[ (f(A) − f(ABᵢ))² ] / V
 *
 * @param plan where the model was evaluated
 * @param values what it gave, in the order of the plan, any unit
 * @returns mean, variance, indices, each with the standard error that the spread of the replicates gives
 * @throws EngineInputError when there are not as many values as the plan has points, or one is not finite
 * Validity: independent inputs, a model of finite variance. Estimates may lie a few standard errors outside 0…1.
 * Source: Saltelli et al., Comput. Phys. Commun. 181 (2010) 259, Table 2 (b) and (f); Jansen, ibid. 117 (1999) 35.
 * @example
 * readSensitivity(planSensitivity({ dimensions: 1, pointsEach: 2, replicates: 2, seed: 1 }), Array(12).fill(5)).mean.value; // 5
 */
export function readSensitivity(plan: SensitivityPlan, values: ArrayLike<number>): SensitivityResult {
	requireValues(values, plan.count);
	const { dimensions, pointsEach, replicates } = plan;
	const perRow = dimensions + 2;
	const parts = Array.from({ length: replicates }, (_, replicate) => {
		const rows = Array.from({ length: pointsEach }, (_row, row) => {
			const start = (replicate * pointsEach + row) * perRow;
			return Array.from({ length: perRow }, (_value, at) => values[start + at]!);
		});
		return estimateParts(rows, dimensions);
	});
	const pooled = (read: (of: Parts) => number): Estimate =>
		estimate(meanOf(parts.map(read)), parts.map(read));
	return {
		mean: pooled(({ mean }) => mean),
		variance: pooled(({ variance }) => variance),
		firstOrder: estimateShares(parts, ({ first }) => first),
		totalEffect: estimateShares(parts, ({ total }) => total),
		evaluations: plan.count
	};
}

/**
 * How much of the variation of a model each of its inputs makes, alone and with others.
 *
 *     as readSensitivity, at the points of planSensitivity
 *
 * @param model value of the model at a point of the unit cube, any unit
 * @param options number of inputs and of points, replicates, seed
 * @returns mean, variance, first-order and total-effect indices with standard errors
 * @throws EngineInputError when the options are outside their limits or the model gives a number that is not finite
 * Validity, Source: as readSensitivity.
 * @example
 * estimateSensitivity(([x]) => 3 * x, { dimensions: 2, pointsEach: 256, replicates: 4, seed: 1 }).totalEffect[1].value; // 0
 */
export function estimateSensitivity(
	model: (point: readonly number[]) => number,
	options: SensitivityOptions
): SensitivityResult {
	const plan = planSensitivity(options);
	const values = Float64Array.from({ length: plan.count }, (_, evaluation) =>
		model(plan.pointAt(evaluation))
	);
	return readSensitivity(plan, values);
}
