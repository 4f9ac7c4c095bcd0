/** Kinds of battery as data: what each holds, bears, gives off and how it wears. */
export * from './types';
export { CHEMISTRIES, chemistryOf, findChemistry } from './table';
export {
	CUT_OFF_FIELDS,
	guardOf,
	hasLatches,
	HEAT_LIMIT_FIELDS,
	heatFieldsOf,
	heatLimitsOf,
	NEVER_CUT_C,
	type CutOffs,
	type HeatFields,
	type HeatGuard,
	type HeatLimits
} from './guard';
export { chargeVoltageV } from './charge-voltage';
export { findGasNeeds, type GasNeeds } from './gas';
export { wearOf, type WornBattery } from './wear';
