/**
 * Values that sensors and loggers write when they have nothing to say. They are no measurements, however possible they look.
 * Source: common practice of one-wire sensors (−127 without an answer, 85 before the first conversion) and of loggers that
 * mark what is missing with the ends of their number range; from memory.
 */

/** As written, whatever the unit: nothing under a bonnet is exactly this. */
const NEVER_MEASURED: readonly number[] = [
	...[9999, -9999, 999.9, -999.9, 9999.9, -9999.9, 99999, -99999, -999],
	...[32767, -32768, 65535, 6553.5, 3276.7, -3276.8]
];

/** In °C: a sensor that does not answer. */
const NO_ANSWER_C = -127;
/** In °C: a sensor that was asked before it had measured; it can also be true. */
export const POWER_ON_C = 85;
/** What is this far from the value before cannot have been reached in one step, K. */
const POWER_ON_JUMP_K = 15;
/** Rounding of a value that was converted to °F and back, K. */
const ROUNDING_K = 0.051;

const isNear = (value: number, mark: number): boolean => Math.abs(value - mark) <= ROUNDING_K;

/** Whether a value, as it was written, stands for "nothing measured". */
export const isNeverMeasured = (written: number): boolean => NEVER_MEASURED.includes(written);

/**
 * Whether a temperature is a mark of its sensor and no measurement.
 *
 * @param tempC what was read, °C
 * @param beforeC the last temperature that was one, °C; NaN at the start
 * @returns true for −127 °C, and for 85 °C at the start or more than 15 K from the value before
 * Validity: at the start a surface that is truly 85.0 °C is passed over until its value changes.
 * Source: common practice of one-wire temperature sensors, from memory.
 * @example
 * isSensorMark(85, 31); // true
 * isSensorMark(85, 84.5); // false
 */
export function isSensorMark(tempC: number, beforeC: number): boolean {
	if (isNear(tempC, NO_ANSWER_C)) return true;
	return isNear(tempC, POWER_ON_C) && !(Math.abs(tempC - beforeC) <= POWER_ON_JUMP_K);
}
