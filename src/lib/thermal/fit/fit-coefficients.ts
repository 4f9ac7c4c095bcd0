import { requirePositive } from '../correlations/require';
import { findAirPull, READ_AIR_ERROR, requireAirError, type AirError } from './air-error';
import { listUnused, type UnusedChannel } from './blocks';
import { weighCandidates, type Candidate } from './candidates';
import type { FittedCoefficient } from './coefficients';
import {
	describeEstimates,
	findCorrelation,
	findPosterior,
	type CoefficientEstimate,
	type Posterior
} from './estimates';
import { findFit, type FindOptions, type Found } from './find-fit';
import { measureErrors } from './fit-errors';
import { FitSetup, type TraceToFit } from './fit-setup';
import { compareOn, leaveEachOut, type ErrorsCompared } from './leave-out';
import { residualsOf, type Noises } from './noise';
import { drawResiduals, sortByTemperature, type ResidualCurve, type TemperatureBin } from './residual-views';
import { LOSSES, type LossName } from './robust-loss';
import type { FitStatus } from './search';
import type { Sensitivities } from './trace-problem';
import { findUntold, type Untold } from './untold';

/** The coefficient book: group → key → value. */
export type FitBook = Readonly<Record<string, Readonly<Record<string, number>>>>;

export interface CoefficientFitOptions {
	/** How far-off readings count; soft-l1 unless said otherwise. */
	loss?: LossName;
	/** What no channel is believed to be better than, K; 0.1 unless said otherwise. */
	leastSdK?: number;
	/** How good the readings of the outside air are; ± 0.3 K, off alike for 15 min, unless said otherwise. */
	airError?: AirError;
	/** Whether to fit without each trace in turn; so it is unless said otherwise. */
	leaveOut?: boolean;
}

export interface CoefficientFitInput {
	traces: readonly TraceToFit[];
	coefficients: readonly FittedCoefficient[];
	book: FitBook;
	options?: CoefficientFitOptions;
}

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
	unused: UnusedChannel[];
	rounds: number;
	iterations: number;
	/** How often the vehicle was run. */
	runs: number;
}

/** A fit that could not be begun is returned, not thrown. */
export type CoefficientFit = DoneCoefficientFit | { status: 'failed'; reason: string };

const LEAST_SD_K = 0.1;
/** How the work is shared out, for those who wait: the fit, the fits without each trace, the air's error, what else would tell. */
const SHARES = { fit: 0.5, leftOut: 0.35, air: 0.08, candidates: 0.07 };

const REASONS: Readonly<Record<FitStatus, string>> = {
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

function* shareOf<T>(work: Generator<number, T>, from: number, size: number): Generator<number, T> {
	for (let step = work.next(); ; step = work.next()) {
		if (step.done) return step.value;
		yield from + size * step.value;
	}
}

function* sensitivitiesAt(
	setup: FitSetup,
	{ parameters }: Found,
	loss: LossName
): Generator<number, Sensitivities> {
	const work = setup.problemOf(setup.all, LOSSES[loss]).findSensitivities(parameters);
	for (let step = work.next(); ; step = work.next()) {
		if (step.done) return step.value;
		yield SHARES.fit;
	}
}

/** What the model gives with the book's values and with those that were found. */
function compareFitted(setup: FitSetup, { parameters }: Found, book: readonly (number | null)[]) {
	const problem = setup.problemOf(setup.all, LOSSES.squares);
	const { blocks } = problem;
	const foretold = setup.models.map((model) =>
		model.predict(
			book,
			model.starts.map(({ mean }) => mean)
		)
	);
	const before = blocks.map((block) => residualsOf(block, foretold[block.trace]!));
	const after = problem.residuals(parameters);
	const timesS = setup.all.map((trace) => setup.traceAt(trace).trace.timeS);
	return {
		errors: { before: measureErrors(blocks, before)!, after: measureErrors(blocks, after)! },
		residuals: drawResiduals(blocks, timesS, before, after),
		byTemperature: sortByTemperature(blocks, before, after)
	};
}

function describeBefore(
	setup: FitSetup,
	traces: readonly TraceToFit[],
	book: readonly (number | null)[]
): number[] {
	return setup.coefficients.map(({ group, key }, at) => {
		const own = traces.map(({ scenario }) => scenario[group] as Readonly<Record<string, number>> | null);
		return book[at] ?? own.find((values) => values !== null)![key]!;
	});
}

/**
 * Fits coefficients to measured temperatures of one or many days together.
 *
 *     min  Σ wᵢ ρ((Tᵢ(θ) − Mᵢ)/σ) + Σ zₖ²,   θₖ = law(mₖ, sₖ, zₖ),   zₖ within its bounds
 *
 * θ moves in standard deviations z of its prior, and is kept within its bounds by projecting each step onto them. σ and the number of
 * readings that say as much as an independent one are read from the residuals of each channel, and w counts the readings down by it:
 * readings a minute apart are off by much the same. Each measured node's start temperature is fitted along, believed to be its first
 * reading ± 1 K. Intervals are those of the normal approximation at the best fit, in z, with Student's distribution for σ.
 *
 * @param input traces with their scenarios (K, s, A as FitTrace says), coefficients with priors and bounds, the book that holds
 *   before, and options
 * @returns as a generator that yields the share of the work done and is broken off by `return`: estimates with intervals of 90 %,
 *   correlations, noises, what the data could not tell and what would, errors before and after, residuals for charts; `failed` with
 *   the reason where the vehicle cannot be run at the middles of the priors
 * @throws EngineInputError with the path for a trace, coefficient, prior or bound that cannot be
 * Validity: the model taken for true but for errors that hang together for much less than a trace is long; sensors without a
 * lasting error of their own; σ, τ and the derivatives taken for known once they are found.
 * Source: Seber and Wild, Nonlinear Regression (1989), chapter 2; Huber, Robust Statistics (1981), section 7.6; Geyer,
 * Statistical Science 7 (1992) 473.
 * @example
 * const scenario = defaultScenario([{ minutes: 60, engineOn: true, speedKmh: 60 }, { minutes: 60 }]);
 * const caseC = runScenario(scenario).minutes.nodes.case;
 * const trace = { startedAtHour: 6, timeS: Float64Array.from(caseC.keys(), (minute) => 60 * minute), channels: { caseC } };
 * const prior = { law: 'lognormal', middle: 30, spread: 0.5 };
 * const work = fitCoefficients({ traces: [{ trace, scenario }], coefficients: [{ group: 'bay', key: 'leakClosed', prior }], book: {} });
 * let step = work.next();
 * while (!step.done) step = work.next();
 * step.value.status; // 'done'
 */
export function* fitCoefficients({
	traces,
	coefficients,
	book,
	options = {}
}: CoefficientFitInput): Generator<number, CoefficientFit> {
	const { loss = 'soft-l1', leastSdK = LEAST_SD_K, leaveOut = true, airError = READ_AIR_ERROR } = options;
	requirePositive({ 'options.leastSdK': leastSdK });
	requireAirError(airError);
	const setup = new FitSetup(traces, coefficients);
	const find: FindOptions = { loss: LOSSES[loss], leastSdK };
	const middle = setup.problemOf(setup.all, find.loss).middle();
	const found = yield* shareOf(
		findFit((each) => setup.problemOf(setup.all, each), find, middle),
		0,
		SHARES.fit
	);
	if (found.status === 'not finite at the start') return { status: 'failed', reason: REASONS[found.status] };
	const before = setup.coefficients.map(({ group, key }) => book[group]?.[key] ?? null);
	const leftOutTraces = leaveOut
		? yield* shareOf(
				leaveEachOut(setup, find, found.parameters, found.noises, before),
				SHARES.fit,
				SHARES.leftOut
			)
		: null;
	const sensitivities = yield* sensitivitiesAt(setup, found, loss);
	const airPull = yield* shareOf(
		findAirPull(setup, found.parameters, sensitivities, found.noises, airError),
		SHARES.fit + SHARES.leftOut,
		SHARES.air
	);
	const posterior = findPosterior(setup.blocksOf(setup.all, 'fitted'), sensitivities, found.noises, airPull);
	const candidates = yield* shareOf(
		weighCandidates(setup, found.parameters, sensitivities, found.noises, posterior),
		1 - SHARES.candidates,
		SHARES.candidates
	);
	return describe(setup, traces, { found, before, posterior, candidates, leftOutTraces });
}

interface Pieces {
	found: Found;
	before: readonly (number | null)[];
	posterior: Posterior;
	candidates: Candidate[];
	leftOutTraces: ErrorsCompared | null;
}

function describe(setup: FitSetup, traces: readonly TraceToFit[], pieces: Pieces): DoneCoefficientFit {
	const { found, before, posterior, candidates, leftOutTraces } = pieces;
	const { status, settled, parameters, noises, rounds, iterations } = found;
	const values = setup.problemOf(setup.all, LOSSES.squares).valuesAt(parameters);
	const estimates = describeEstimates(
		setup.coefficients,
		parameters,
		posterior,
		describeBefore(setup, traces, before)
	);
	const correlation = findCorrelation(posterior.covariance, estimates.length);
	const { errors, ...views } = compareFitted(setup, found, before);
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
