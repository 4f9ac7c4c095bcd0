import type { CutOutReport } from './cut-out-report';

/** A hot day, °C. */
const HOT_FROM_C = 30;
/** From the late afternoon to the end of the evening, h since midnight. */
const EVENING_FROM_HOUR = 15;
const EVENING_TO_HOUR = 24;
/** Cells that were too hot need a part of an hour at the least, and a part of a night at the most, h. */
const SHORTEST_HOURS = 0.5;
const LONGEST_HOURS = 9;

/**
 * Whether a report reads as cells that were too hot mostly do: a hot day, dark from the late afternoon on, back by
 * itself within hours. It says nothing of how likely heat is; it says where a model that finds heat unlikely may be wrong.
 *
 * @param report when it went dark and came back
 * @param hottestDayC the hottest of that day, °C
 * @returns true for such a report; false for a cooler day, another hour, and where nobody knows when it came back
 * Validity: batteries with a BMS that lets them come back by itself.
 * Source: engineering judgement, after the hours that cells under a bonnet take to warm and to cool.
 * @example
 * isEveningPattern({ wentDarkHour: 17.5, cameBackHour: 20.5, withinHours: 0.5 }, 41); // true
 */
export function isEveningPattern({ wentDarkHour, cameBackHour }: CutOutReport, hottestDayC: number): boolean {
	if (hottestDayC < HOT_FROM_C || cameBackHour === null) return false;
	if (wentDarkHour < EVENING_FROM_HOUR || wentDarkHour > EVENING_TO_HOUR) return false;
	const darkHours = cameBackHour - wentDarkHour;
	return darkHours >= SHORTEST_HOURS && darkHours <= LONGEST_HOURS;
}
