/** Cables and fuses in warm air. */
export {
	ambientFactor,
	ampacityA,
	conductorTempC,
	INSULATION_CLASSES_C,
	tableAmpacityA,
	type InsulationC,
	type Laying
} from './ampacity';
export {
	cableResistanceOhm,
	copperResistanceOhm,
	copperWarmth,
	LARGEST_AREA_MM2,
	shortCircuitFactor,
	shortCircuitWithstandS,
	SMALLEST_AREA_MM2
} from './copper';
export { fuseContinuousA, fuseRatingAtA, fuseSurelyOpensA } from './fuse';
export {
	sizeCableAndFuse,
	type CableAndFuse,
	type CableCheck,
	type CableFinding,
	type CableSizing
} from './size-cable-and-fuse';
export { WIRING_SOURCES, type WiringSource } from './sources';
