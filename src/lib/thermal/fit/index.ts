/** Least squares with priors and bounds, and coefficients from measured traces. */
export type { AirError } from './air-error';
export type { Candidate } from './candidates';
export {
	FITTED_GROUPS,
	type CoefficientPrior,
	type FittedCoefficient,
	type FittedGroup
} from './coefficients';
export type { CoefficientFit, DoneCoefficientFit } from './describe-fit';
export type { CoefficientEstimate } from './estimates';
export {
	fitCoefficients,
	type CoefficientFitInput,
	type CoefficientFitOptions,
	type FitBook
} from './fit-coefficients';
export type { FitError, FitErrors } from './fit-errors';
export type { TraceToFit } from './fit-setup';
export { holdTrace, type HeldTrace } from './hold-trace';
export { fitLeastSquares, type Fit } from './least-squares';
export type { ErrorsCompared } from './leave-out';
export type { Misfit } from './misfits';
export type { ChannelNoise, Noises } from './noise';
export type { Bounds, LeastSquaresProblem, Prior } from './problem';
export type { ResidualCurve, TemperatureBin } from './residual-views';
export type { LossName } from './robust-loss';
export type { FitStatus } from './search';
export type { UnmeasuredStart } from './start-temps';
export { CHANNEL_LABELS, CHANNEL_NODES, FIT_CHANNELS, type FitChannel, type FitTrace } from './trace';
export type { Untold } from './untold';
