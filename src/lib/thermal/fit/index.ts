/** Least squares with priors and bounds. */
export { fitLeastSquares, type Fit } from './least-squares';
export type { Bounds, LeastSquaresProblem, Prior } from './problem';
export type { FitStatus } from './search';
