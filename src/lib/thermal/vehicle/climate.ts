import { fifthRootOf, sineOf } from '../solve/elementary';
import type { ClimateGroup } from '../types';

/**
 * Share of the daily range by which each clock hour 0…23 is cooler than the hottest (hour 24 is hour 0).
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6, local solar time.
 */
const RANGE_SHARE = [
	0.82, 0.88, 0.92, 0.95, 0.98, 1, 0.98, 0.91, 0.74, 0.55, 0.38, 0.23, 0.13, 0.05, 0, 0, 0.06, 0.14, 0.24,
	0.39, 0.5, 0.59, 0.68, 0.75
] as const;

const HOURS_A_DAY = 24;
const MINUTES_PER_H = 60;

/**
 * Air temperature of the design day.
 *
 *     Tamb(h) = tMax − dailyRange f(h),  f linear between the hours
 *
 * @param hour local solar time, h; runs on past 24
 * @param climate tMax in °C and dailyRange in K
 * @returns dry-bulb temperature, °C
 * Validity: a clear design day that repeats itself.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6.
 * @example
 * ambientTempC(14.5, { tMax: 40, dailyRange: 14 }); // 40
 */
export function ambientTempC(hour: number, climate: Pick<ClimateGroup, 'tMax' | 'dailyRange'>): number {
	const clock = hour - HOURS_A_DAY * Math.floor(hour / HOURS_A_DAY);
	const whole = Math.floor(clock);
	const before = RANGE_SHARE[whole % HOURS_A_DAY]!;
	const after = RANGE_SHARE[(whole + 1) % HOURS_A_DAY]!;
	return climate.tMax - climate.dailyRange * (before + (after - before) * (clock - whole));
}

/** Writes the air's temperature on whole minutes from the start. */
export function fillAmbient(
	column: Float64Array,
	startHour: number,
	climate: Pick<ClimateGroup, 'tMax' | 'dailyRange'>
): void {
	for (let from = 0; from < column.length;) {
		// Up to the next whole hour the air follows a straight line.
		const hour = startHour + from / MINUTES_PER_H;
		const to = Math.min(column.length, Math.ceil((Math.floor(hour) + 1 - startHour) * MINUTES_PER_H));
		const startC = ambientTempC(hour, climate);
		const perMinute =
			(ambientTempC(startHour + (to - 1) / MINUTES_PER_H, climate) - startC) / Math.max(to - 1 - from, 1);
		for (let minute = from; minute < to; minute++) column[minute] = startC + (minute - from) * perMinute;
		from = to;
	}
}

/**
 * Sun on the bonnet.
 *
 *     I(h) = sunPeak max(0, sin(π (h − 6)/12))^1.2
 *
 * @param hour local solar time, h; runs on past 24
 * @param climate sunPeak in W/m²
 * @returns irradiance, W/m²
 * Validity: clear sky, day and night of twelve hours each.
 * Source: engineering judgement, no source.
 * @example
 * sunWPerM2(12, { sunPeak: 1000 }); // 1000
 */
export function sunWPerM2(hour: number, climate: Pick<ClimateGroup, 'sunPeak'>): number {
	const clock = hour - HOURS_A_DAY * Math.floor(hour / HOURS_A_DAY);
	if (clock <= 6 || clock >= 18) return 0;
	const height = sineOf((Math.PI * (clock - 6)) / 12);
	return climate.sunPeak * height * fifthRootOf(height);
}
