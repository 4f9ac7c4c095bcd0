import type { MeasuredCourse, Scenario } from '../types';
import { readSoc, type ChargeSpan } from './charge';
import { ambientTempC } from './climate';

const S_PER_H = 3600;
/** Two instants nearer than this are one, s. */
export const SAME_INSTANT_S = 1e-3;

type Course<K extends keyof MeasuredCourse> = NonNullable<MeasuredCourse[K]>;

/** Straight between two readings, level before the first and after the last. */
function readAirC({ everyS, valuesC }: Course<'air'>, afterS: number): number {
	const place = Math.min(Math.max(afterS / everyS, 0), valuesC.length - 1);
	const whole = Math.floor(place);
	const before = valuesC[whole]!;
	return place === whole ? before : before + (place - whole) * (valuesC[whole + 1]! - before);
}

/**
 * Temperature of the outside air: as measured where it was, the design day's otherwise.
 *
 * @param scenario whole scenario
 * @param hour local solar time, h; runs on past 24
 * @returns dry-bulb temperature, °C
 * Validity: as ambientTempC; measured air is a straight line between its readings.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6, for the design day.
 * @example
 * const day = defaultScenario([{ minutes: 60 }]);
 * const measured = { air: { everyS: 600, valuesC: Float64Array.of(20, 26) } };
 * outsideTempC({ ...day, measured }, 6 + 1 / 12); // 23.000
 */
export function outsideTempC({ measured, climate, start }: Scenario, hour: number): number {
	const air = measured?.air;
	return air ? readAirC(air, (hour - start.hour) * S_PER_H) : ambientTempC(hour, climate);
}

/** The next hour at which the outside air's line bends: a whole one, or that of the next reading. */
export function nextAirBendHour({ measured, start }: Scenario, hour: number): number {
	const air = measured?.air;
	if (!air) return Math.floor(hour + SAME_INSTANT_S / S_PER_H) + 1;
	const reading = Math.floor(((hour - start.hour) * S_PER_H + SAME_INSTANT_S) / air.everyS) + 1;
	return start.hour + (reading * air.everyS) / S_PER_H;
}

/** What flows from `timeS` on as far as it was measured; where it was not, what was planned, to the next reading. */
export function measureSpan(
	{ everyS, valuesA }: Course<'current'>,
	planned: ChargeSpan,
	timeS: number
): ChargeSpan {
	const piece = Math.floor((timeS + SAME_INSTANT_S) / everyS);
	if (piece >= valuesA.length) return planned;
	const lastsS = (piece + 1) * everyS - timeS;
	const currentA = valuesA[piece]!;
	if (Number.isNaN(currentA)) {
		return planned.lastsS <= lastsS ? planned : { ...planned, lastsS, socAtEnd: readSoc(planned, lastsS) };
	}
	const span = { ...planned, currentA, decayPerS: 0, refusedA: 0, lastsS: Infinity };
	return { ...span, lastsS, socAtEnd: readSoc(span, lastsS) };
}
