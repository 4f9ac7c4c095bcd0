/** What is noted in the field, held against the model. */
export { toReferenceTemperature, type CapacityTest } from './capacity-tests';
export {
	projectCapacity,
	type CapacityTrend,
	type Projection,
	type TrendLaw,
	type YearsRange
} from './capacity-trend';
export { weighReport, type CutOutReport } from './cut-out-report';
export { isEveningPattern } from './evening-pattern';
export {
	holdCapacity,
	holdLabel,
	holdMeasured,
	STANDS,
	type Held,
	type LifePoint,
	type Stand
} from './held-against';
export { holdDays, tenVehicles, type HeldDays, type StatedDays } from './held-days';
export { learnFrom, type Belief, type LearntUnknown, type Learning, type ReadingDay } from './learn';
export { OTHER_CAUSES, type RankedCause } from './other-causes';
export { spreadPeak, type PeakSpread } from './peak-spread';
export { checkReading, READING_PLACES, weighReading, type FieldReading, type ReadingPlace } from './readings';
export { weighHeat, type HeatCause, type HourRange } from './was-it-heat';
