/** How far an estimate can be trusted: draws of what is not known, and what they come to. */
export { drawCutOuts, type CutOutChance } from './draw-cut-outs';
export { copyScenario, drawScenario, moveBy } from './draw-scenario';
export {
	countCutOutDays,
	type ClimateMonth,
	type CutOutDays,
	type DayCount,
	type TouringYear
} from './cut-out-days';
export { finishWork } from './finish-work';
export { findHottestDay } from './hottest-day';
export { rankInfluences, type Influence, type Influences } from './influence';
export { PRIORS, type Prior, type Spread } from './priors';
export {
	spreadDay,
	type ConvergencePoint,
	type CurveBand,
	type DaySpread,
	type SpreadOptions
} from './spread-day';
