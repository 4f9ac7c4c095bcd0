/** Everything that an estimate must say beside its number. */
export type { ExpectedLife, LifeYear, Wear } from '../assess/expected-life';
export { REMEDIES, type Remedy } from '../assess/remedies';
export type { EnvelopePoint, SafeEnvelope } from '../assess/safe-envelope';
export {
	priceRemedies,
	USUAL_MONEY_PER_HOUR,
	type RemedyOffer,
	type RemedySearch,
	type RemedySet
} from '../assess/search-remedies';
export type { ClimateMonth, CutOutDays, DayCount, TouringYear } from '../uncertainty/cut-out-days';
export type { Influence, Influences } from '../uncertainty/influence';
export type { CurveBand, DaySpread } from '../uncertainty/spread-day';
export {
	finishOutlook,
	FULL_EFFORT,
	LIGHT_EFFORT,
	makeOutlook,
	type Outlook,
	type OutlookEffort,
	type OutlookProgress,
	type OutlookRequest
} from './make-outlook';
