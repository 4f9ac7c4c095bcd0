import { ambientTempC } from '../vehicle/climate';
import { requirePositive, requireWithin } from './require';

const HOURS_A_DAY = 24;

/** Area between a straight line and a threshold over one hour, where the line lies above it, K·h. */
function hourAbove(fromC: number, toC: number, thresholdC: number): number {
	const [before, after] = [fromC - thresholdC, toC - thresholdC];
	if (before >= 0 && after >= 0) return (before + after) / 2;
	const top = Math.max(before, after);
	return top <= 0 ? 0 : top ** 2 / (2 * Math.abs(after - before));
}

/**
 * How far and how long a day that repeats itself is warmer than a threshold.
 *
 *     G = ∫ max(T(t) − threshold, 0) dt over 24 h,   T straight between the hours
 *
 * @param hourlyC temperature at 24 hours one after the other, °C; the last is followed by the first
 * @param thresholdC °C
 * @returns degree-hours of one day, K·h
 * @throws EngineInputError unless there are 24 temperatures within −100…150 °C
 * Validity: exact for the broken line.
 * Source: closed form.
 * @example
 * degreeHoursOfDay([...Array(12).fill(20), ...Array(12).fill(30)], 25); // 57.5
 */
export function degreeHoursOfDay(hourlyC: readonly number[], thresholdC: number): number {
	requireWithin(HOURS_A_DAY, HOURS_A_DAY, { hours: hourlyC.length });
	for (const hourC of hourlyC) requireWithin(-100, 150, { hourC });
	requireWithin(-100, 150, { thresholdC });
	return hourlyC.reduce(
		(sum, hourC, at) => sum + hourAbove(hourC, hourlyC[(at + 1) % HOURS_A_DAY]!, thresholdC),
		0
	);
}

/** A month's average day. */
export interface MonthDay {
	/** Mean of the daily highest, °C. */
	maxC: number;
	/** Mean of the daily lowest, °C. */
	minC: number;
	days: number;
}

/**
 * Degree-hours of a month above a threshold when each day is the month's average one, shaped as a clear design day.
 *
 *     G = days ∫ max(Tmax − (Tmax − Tmin) f(t) − threshold, 0) dt over 24 h
 *
 * @param month mean highest and lowest in °C, number of days
 * @param thresholdC °C
 * @returns degree-hours, K·h
 * @throws EngineInputError when a temperature lies outside −100…100 °C, the highest below the lowest or the days outside 1…31
 * Validity: a floor: days hotter than the average one add more than cooler ones take away.
 * Source: shape: ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6; the integral is a closed form.
 * @example
 * degreeHoursOfMonth({ maxC: 40, minC: 26, days: 30 }, 26); // 4674.6
 */
export function degreeHoursOfMonth({ maxC, minC, days }: MonthDay, thresholdC: number): number {
	requireWithin(-100, 100, { maxC, minC, thresholdC });
	requireWithin(minC, 100, { maxC });
	requirePositive({ days });
	requireWithin(1, 31, { days });
	const shape = { tMax: maxC, dailyRange: maxC - minC };
	const hourlyC = Array.from({ length: HOURS_A_DAY }, (_, hour) => ambientTempC(hour, shape));
	return days * degreeHoursOfDay(hourlyC, thresholdC);
}

/** How hot a place's hottest month is. */
export type HeatZone = 'mild' | 'warm' | 'hot' | 'very hot';

/**
 * How hot a place's months make a bonnet's surroundings, in one word.
 *
 *     degree-hours above 35 °C on the average day of the hottest month:  0 mild, to 10 warm, to 40 hot, beyond very hot
 *
 * @param months mean highest and lowest of each month, °C
 * @returns the word
 * @throws EngineInputError when there is no month, or as degreeHoursOfMonth
 * Validity: for grouping places; the limits are engineering judgement, no source.
 * Source: engineering judgement, no source; the degree-hours as degreeHoursOfMonth.
 * @example
 * heatZone([{ maxC: 36.4, minC: 21.4, days: 31 }]); // 'warm'
 */
export function heatZone(months: readonly MonthDay[]): HeatZone {
	requirePositive({ months: months.length });
	const hottest = Math.max(...months.map((month) => degreeHoursOfMonth(month, 35) / month.days));
	if (hottest === 0) return 'mild';
	if (hottest <= 10) return 'warm';
	return hottest <= 40 ? 'hot' : 'very hot';
}
