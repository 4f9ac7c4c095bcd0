/** How batteries wear by standing, by cycling and by heat. */
export { arrheniusFactor, GAS_CONSTANT, meanAgeingTempC } from './arrhenius';
export type { Extrapolation } from './extrapolation';
export type { HoursAtTemperature } from './histogram';
export {
	LEAD_ACID_HALVING_K,
	leadAcidLifeFactor,
	leadAcidRemaining,
	leadAcidWearPerYear,
	type LeadAcidDuty
} from './lead-acid';
export { leadAcidBand, type LeadAcidBand, type LeadAcidYear } from './lead-acid-band';
export { lfpAgeingBand, type AgeingWay, type LfpDuty, type LfpYear } from './lfp-band';
export { NAUMANN_CALENDAR_TESTED, naumannCalendarLoss, naumannResistanceGain } from './naumann-calendar';
export { NAUMANN_CYCLE_TESTED, naumannCycleLoss } from './naumann-cycle';
export { SWIERCZYNSKI_TESTED, swierczynskiCalendarLoss } from './swierczynski-calendar';
export type { TestedRange } from './tested-range';
export { HOURS_PER_YEAR, MONTHS_PER_YEAR, SECONDS_PER_YEAR } from './time';
export { WANG_TESTED, wangCapacityLoss, wangCellAh, wangFactor, wangThroughputAh } from './wang-cycle';
