/** Even points, distributions, intervals, quantiles, sensitivity. */
export { betaQuantile, incompleteBeta } from './beta';
export { distributionQuantile, type Distribution } from './distributions';
export { gammaQuantile, logGamma, lowerGamma, upperGamma } from './gamma';
export { hashWords, mixBits } from './integer-hash';
export {
	clopperPearsonInterval,
	jeffreysInterval,
	poissonInterval,
	poissonRatioInterval,
	wilsonInterval,
	type Interval
} from './intervals';
export { normalCdf, normalQuantile } from './normal';
export { sampleQuantile } from './sample-quantile';
export { estimateSensitivity, readSensitivity, type Estimate, type SensitivityResult } from './sensitivity';
export { planSensitivity, type SensitivityOptions, type SensitivityPlan } from './sensitivity-plan';
export {
	SOBOL_DIMENSIONS,
	scrambledSobolCoordinate,
	scrambledSobolPoint,
	sobolCoordinate,
	sobolPoint
} from './sobol';
export { standardDeviation } from './standard-deviation';
