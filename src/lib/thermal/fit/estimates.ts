import { valueAt, type Coefficient } from './coefficients';
import { informationOf, withPriorInformation } from './information';
import { addMatrices, invertPositive, multiply, scaleMatrix, type Rows } from './small-matrices';
import type { Block } from './blocks';
import type { Noises } from './noise';
import { studentReach } from './student';
import type { Sensitivities } from './trace-problem';

const CONFIDENCE = 0.9;
/** At most so much of what the data tell is taken off for what was fitted to them. */
const LEAST_LEFT = 0.2;
/** A place this near to an end, in standard deviations of the prior, is at it. */
const AT_END = 1e-9;

/** What is held of a coefficient after the fit. */
export interface CoefficientEstimate {
	group: Coefficient['group'];
	key: string;
	unit: string;
	/** In the coefficient book, or in the scenario of the first trace where the book is silent. */
	before: number;
	value: number;
	/** Nine chances in ten that it lies between them, as far as model and prior are right; never beyond the bounds. */
	low: number;
	high: number;
	/** Standard deviation after the fit over that of the prior, on the prior's own scale: 1 says that nothing was learnt. */
	spreadLeft: number;
	atBound: 'low' | 'high' | null;
}

/** What data and priors together leave open. */
export interface Posterior {
	/** Of the data alone, what was fitted to them taken off. */
	dataInformation: number[][];
	/** Of all parameters, in standard deviations of their priors. */
	covariance: number[][];
	/** The same if the air were known exactly. */
	covarianceOnAir: number[][];
	/** Independent readings of the channel with the fewest, less its share of what was learnt: by how much σ and τ are known. */
	degrees: number;
}

/**
 * The posterior in the normal approximation.
 *
 *     H = I·(n − q)/n + 1,   n = Σ readings/τ,   q = Σ (1 − (H⁻¹)ₖₖ): parameters' worth of what was learnt
 *     C = H⁻¹ (H + A) H⁻¹,   A: what the error of the air does to the data's pull on the parameters
 *
 * Readings of all channels are off together where the air is; their own residuals hardly show it, so that it is added.
 *
 * Source: Seber and Wild, Nonlinear Regression (1989), chapter 2, from memory; the count q as the trace of
 * the smoother of Hastie, Tibshirani and Friedman, The Elements of Statistical Learning, 2nd ed., section 7.6; C in the form of
 * Huber, Robust Statistics (1981), section 6.6, from memory.
 */
export function findPosterior(
	blocks: readonly Block[],
	sensitivities: Sensitivities,
	noises: Noises,
	airPull: Rows
): Posterior {
	const data = informationOf(blocks, sensitivities, noises);
	const counts = Object.values(noises).map(({ readings, perIndependent }) => readings / perIndependent);
	const independent = counts.reduce((sum, count) => sum + count, 0);
	const first = invertPositive(withPriorInformation(data));
	const learnt = first.reduce((sum, row, at) => sum + (1 - row[at]!), 0);
	const left = Math.max((independent - learnt) / independent, LEAST_LEFT);
	const dataInformation = scaleMatrix(data, left);
	const whole = withPriorInformation(dataInformation);
	const covarianceOnAir = invertPositive(whole);
	const pulls = addMatrices(whole, scaleMatrix(airPull, left * left));
	return {
		dataInformation,
		covarianceOnAir,
		covariance: multiply(multiply(covarianceOnAir, pulls), covarianceOnAir),
		degrees: Math.max(Math.min(...counts) - learnt / counts.length, 1)
	};
}

/** Estimates with their intervals, from the places that were found and the posterior. */
export function describeEstimates(
	coefficients: readonly Coefficient[],
	parameters: readonly number[],
	{ covariance, degrees }: Posterior,
	before: readonly number[]
): CoefficientEstimate[] {
	const reach = studentReach(CONFIDENCE, degrees);
	return coefficients.map(({ group, key, unit, prior, low, high, lowZ, highZ }, at) => {
		const z = parameters[at]!;
		const sd = Math.sqrt(covariance[at]![at]!);
		const within = (place: number) => Math.min(Math.max(valueAt(prior, place), low), high);
		return {
			...{ group, key, unit },
			before: before[at]!,
			value: within(z),
			low: within(z - reach * sd),
			high: within(z + reach * sd),
			spreadLeft: sd,
			atBound: z <= lowZ + AT_END ? 'low' : z >= highZ - AT_END ? 'high' : null
		};
	});
}

/** Correlations of the first so many parameters. */
export function findCorrelation(covariance: readonly (readonly number[])[], count: number): number[][] {
	const sds = covariance.map((row, at) => Math.sqrt(row[at]!));
	return Array.from({ length: count }, (_, a) =>
		Array.from({ length: count }, (_entry, b) => (a === b ? 1 : covariance[a]![b]! / (sds[a]! * sds[b]!)))
	);
}
