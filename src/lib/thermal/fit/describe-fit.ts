import { listUnused, type UnusedChannel } from './blocks';
import type { Candidate } from './candidates';
import { describeEstimates, findCorrelation, type CoefficientEstimate, type Posterior } from './estimates';
import type { Found } from './find-fit';
import { measureErrors } from './fit-errors';
import type { FitSetup, TraceToFit } from './fit-setup';
import { compareOn, type ErrorsCompared } from './leave-out';
import { findMisfits, type Misfit } from './misfits';
import type { Noises } from './noise';
import { drawResiduals, sortByTemperature, type ResidualCurve, type TemperatureBin } from './residual-views';
import type { FitStatus } from './search';
import type { TraceProblem } from './trace-problem';
import { findUntold, type Untold } from './untold';

export interface DoneCoefficientFit {
	status: 'done';
	/** How the search ended, and in words. */
	stopped: FitStatus;
	reason: string;
	estimates: CoefficientEstimate[];
	/** Of the coefficients, after the fit, on their priors' scales. */
	correlation: number[][];
	noises: Noises;
	untold: Untold;
	/** What would tell most, the best first. */
	candidates: Candidate[];
	errors: {
		fitted: ErrorsCompared;
		heldOutLegs: ErrorsCompared | null;
		leftOutTraces: ErrorsCompared | null;
	};
	residuals: ResidualCurve[];
	byTemperature: TemperatureBin[];
	/** What the model does not follow. Not there in older fits. */
	misfits?: Misfit[];
	unused: UnusedChannel[];
	rounds: number;
	iterations: number;
	/** How often the vehicle was run. */
	runs: number;
}

/** A fit that could not be begun is returned, not thrown. */
export type CoefficientFit = DoneCoefficientFit | { status: 'failed'; reason: string };

export const REASONS: Readonly<Record<FitStatus, string>> = {
	converged:
		'The best fit was found: no step would lower the sum of squares by as much as a thirtieth of a standard deviation does.',
	'evaluations used up':
		'The search was given up after 3,000 looks at the traces; the best that was found is shown.',
	stalled:
		'The search came to where no step makes the fit better although one should; the best that was found is shown.',
	'not finite at the start':
		'The vehicle cannot be run with the middles of the priors, so that there is nothing to begin at.'
};
const NOT_SETTLED = ' What the readings are worth had not settled to 3 % by then.';

/** What the model gives with the book's values and with those that were found, each from the starts that fit best to them. */
function compareFitted({ setup, problem, found, residualsBefore: before }: FitPieces) {
	const { blocks } = problem;
	const after = problem.residuals(found.parameters);
	const timesS = setup.all.map((trace) => setup.traceAt(trace).trace.timeS);
	return {
		errors: { before: measureErrors(blocks, before)!, after: measureErrors(blocks, after)! },
		residuals: drawResiduals(blocks, timesS, before, after),
		byTemperature: sortByTemperature(blocks, before, after),
		misfits: findMisfits(blocks, after)
	};
}

function describeBefore({ setup, traces, before: book }: FitPieces): number[] {
	return setup.coefficients.map(({ group, key }, at) => {
		const own = traces.map(({ scenario }) => scenario[group] as Readonly<Record<string, number>> | null);
		return book[at] ?? own.find((values) => values !== null)![key]!;
	});
}

/** What a fit came to, step by step. */
export interface FitPieces {
	setup: FitSetup;
	problem: TraceProblem;
	traces: readonly TraceToFit[];
	found: Found;
	before: readonly (number | null)[];
	/** With the values of before, K, block by block. */
	residualsBefore: readonly Float64Array[];
	posterior: Posterior;
	candidates: Candidate[];
	leftOutTraces: ErrorsCompared | null;
}

/** Puts together what is told of a fit. */
export function describeFit(pieces: FitPieces): DoneCoefficientFit {
	const { setup, problem, found, before, posterior, candidates, leftOutTraces } = pieces;
	const { status, settled, parameters, noises, rounds, iterations } = found;
	const values = problem.valuesAt(parameters);
	const estimates = describeEstimates(setup.coefficients, parameters, posterior, describeBefore(pieces));
	const correlation = findCorrelation(posterior.covariance, estimates.length);
	const { errors, ...views } = compareFitted(pieces);
	const heldOutLegs = compareOn(setup, 'heldOut', before, () => values);
	return {
		status: 'done',
		stopped: status,
		reason: REASONS[status] + (settled ? '' : NOT_SETTLED),
		...{ estimates, correlation, noises, candidates, rounds, iterations },
		untold: findUntold(estimates, correlation),
		errors: { fitted: errors, heldOutLegs, leftOutTraces },
		...views,
		unused: listUnused(setup.all.map((at) => setup.traceAt(at))),
		runs: setup.models.reduce((sum, { runs }) => sum + runs, 0)
	};
}
