import { requireNotBelow, requirePositive, requireWithin } from '../correlations/require';

/** One discharge with the ampere-hours counted. */
export interface CapacityTest {
	/** Since the battery was fitted, years. */
	years: number;
	capacityAh: number;
	currentA: number;
	cutOffV: number;
	tempC: number;
}

const REFERENCE_C = 25;
const SLOW_HOURS = 3;
/** Of lead-acid batteries, 1/K: for discharges of three hours and more, and for faster ones. */
const PER_K = { slow: 0.006, fast: 0.01 };

/**
 * A capacity as it would be at 25 °C.
 *
 *     C25 = C / (1 + λ (T − 25)),   lead-acid: λ = 0.006/K from three hours on, 0.01/K for faster; lithium: λ = 0
 *
 * @param test what was measured; its time is not used
 * @param isLeadAcid whether the battery is lead-acid
 * @returns Ah
 * @throws EngineInputError when capacity or current is not above 0, or the temperature is outside −20…60 °C
 * Validity: lead-acid between about 5 and 40 °C; lithium is not corrected, for no published coefficient of ours covers it:
 * test between 20 and 30 °C.
 * Source: the correction of IEC 60896-21:2004 and IEEE 450, whose reference is 20 °C and 25 °C; from memory.
 * @example
 * toReferenceTemperature({ years: 0, capacityAh: 94, currentA: 5, cutOffV: 10.8, tempC: 15 }, true); // 100
 */
export function toReferenceTemperature(test: CapacityTest, isLeadAcid: boolean): number {
	const { capacityAh, currentA, tempC } = test;
	requirePositive({ capacityAh, currentA });
	requireWithin(-20, 60, { tempC });
	if (!isLeadAcid) return capacityAh;
	const perK = capacityAh / currentA >= SLOW_HOURS ? PER_K.slow : PER_K.fast;
	return capacityAh / (1 + perK * (tempC - REFERENCE_C));
}

/** Refuses a test that cannot be. */
export function checkTest({ years, capacityAh, currentA, cutOffV, tempC }: CapacityTest): void {
	requireNotBelow(0, { years });
	requirePositive({ capacityAh, currentA, cutOffV });
	requireWithin(-20, 60, { tempC });
}
