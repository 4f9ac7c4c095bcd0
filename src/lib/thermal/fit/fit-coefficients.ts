import { requirePositive } from '../correlations/require';
import { partOf } from '../uncertainty/finish-work';
import { findAirPull, READ_AIR_ERROR, requireAirError, type AirError } from './air-error';
import { weighCandidates } from './candidates';
import type { FittedCoefficient } from './coefficients';
import { describeFit, REASONS, type CoefficientFit } from './describe-fit';
import { findPosterior } from './estimates';
import { findFit, type FindOptions } from './find-fit';
import { FitSetup, type TraceToFit } from './fit-setup';
import { holdValues } from './hold-values';
import { leaveEachOut } from './leave-out';
import { LOSSES, type LossName } from './robust-loss';

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

const LEAST_SD_K = 0.1;
/** How the work is shared out, for those who wait: the fit, the fits without each trace, the air's error, what else would tell. */
const SHARES = { fit: 0.5, leftOut: 0.35, air: 0.08, candidates: 0.07 };

/** A share of a part of the work as one of the whole. */
const within = (from: number, size: number) => (share: number) => from + size * share;

/**
 * Fits coefficients to measured temperatures of one or many days together.
 *
 *     min  Σ wᵢ ρ((Tᵢ(θ) − Mᵢ)/σ) + Σ zₖ²,   θₖ = law(mₖ, sₖ, zₖ),   zₖ within its bounds
 *
 * θ moves in standard deviations z of its prior, and is kept within its bounds by projecting each step onto them. σ and the number of
 * readings that say as much as an independent one are read from the residuals of each channel, and w counts the readings down by it:
 * readings a minute apart are off by much the same. Each measured node's start temperature is fitted along, believed to be its first
 * reading ± 1 K; so it is to the values of before, for the comparison. Intervals are those of the normal approximation at the best fit, in z, with Student's distribution for σ.
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
	const problem = setup.problemOf(setup.all);
	const found = yield* partOf(findFit(problem, find, problem.middle()), within(0, SHARES.fit));
	if (found.status === 'not finite at the start') return { status: 'failed', reason: REASONS[found.status] };
	const { parameters, noises } = found;
	const before = setup.coefficients.map(({ group, key }) => book[group]?.[key] ?? null);
	const leftOutTraces = leaveOut
		? yield* partOf(leaveEachOut(setup, find, parameters, noises, before), within(SHARES.fit, SHARES.leftOut))
		: null;
	const done = SHARES.fit + SHARES.leftOut;
	const residualsBefore = yield* partOf(holdValues(setup, before, noises, find.loss), () => done);
	const sensitivities = yield* partOf(problem.findSensitivities(parameters), () => done);
	const airPull = yield* partOf(
		findAirPull(setup, problem, parameters, sensitivities, noises, airError),
		within(done, SHARES.air)
	);
	const posterior = findPosterior(problem.blocks, sensitivities, noises, airPull);
	const candidates = yield* partOf(
		weighCandidates(setup, parameters, sensitivities, noises, posterior),
		within(done + SHARES.air, SHARES.candidates)
	);
	return describeFit({
		...{ setup, problem, traces, found, before, residualsBefore },
		posterior,
		candidates,
		leftOutTraces
	});
}
