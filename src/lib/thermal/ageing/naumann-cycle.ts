import { requireNotBelow } from '../correlations/require';
import { requireTested, type TestedRange } from './tested-range';

/** Cycled at few temperatures, mostly 40 °C: the law has none in it. */
export const NAUMANN_CYCLE_TESTED: TestedRange = {
	tempC: [20, 40],
	cRate: [0.2, 2],
	depthOfDischarge: [0, 1]
};

/** Share of the capacity lost per root of a full cycle, whatever the rate and the depth. */
export function naumannCycleRate(cRate: number, depthOfDischarge: number): number {
	const rate = 0.063 * cRate + 0.0971;
	const depth = 4.0253 * (depthOfDischarge - 0.6) ** 3 + 1.0923;
	return (rate * depth) / 100;
}

/**
 * Capacity that cycling takes from lithium iron phosphate cells, over and above what standing takes.
 *
 *     loss = (0.0630 C + 0.0971) (4.0253 (DOD − 0.6)³ + 1.0923) √FEC / 100
 *
 * @param cRate current over capacity, 1/h
 * @param depthOfDischarge how deep each cycle goes, 0…1
 * @param fullCycles charge taken out over the capacity: full equivalent cycles
 * @returns lost share of the capacity, 0…1
 * @throws EngineInputError outside 0.2 to 2 C or 0 to 1 of depth, or when the cycles are below zero
 * Validity: graphite/LiFePO4 26650 cells of 3 Ah cycled at 20 to 40 °C and up to 2 C (read in a public
 * implementation; the least rate of 0.2 C from memory).
 * Source: Naumann, Spingler, Jossen, J. Power Sources 451 (2020) 227666 (coefficients read in a public implementation; the
 * 0.6 from memory).
 * @example
 * naumannCycleLoss(1, 1, 1000); // 0.068344
 */
export function naumannCycleLoss(cRate: number, depthOfDischarge: number, fullCycles: number): number {
	requireTested(NAUMANN_CYCLE_TESTED, { cRate, depthOfDischarge });
	requireNotBelow(0, { fullCycles });
	return naumannCycleRate(cRate, depthOfDischarge) * Math.sqrt(fullCycles);
}
