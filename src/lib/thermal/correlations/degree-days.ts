import { requirePositive, requireWithin } from './require';

/**
 * How far days are colder than a base, summed.
 *
 *     HDD = Σ max(base − Tday, 0)
 *
 * @param dailyMeansC mean temperature of each day, °C
 * @param baseC base, °C (18 for heating in most of the world)
 * @returns degree-days, K·d
 * @throws EngineInputError when a temperature or the base lies outside −100…100 °C
 * Validity: daily means; from hourly values each below the base counts by itself and the sum is larger.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14 (degree-days).
 * @example
 * heatingDegreeDays([10, 18, 25], 18); // 8
 */
export function heatingDegreeDays(dailyMeansC: readonly number[], baseC: number): number {
	requireTemps(dailyMeansC, baseC);
	return dailyMeansC.reduce((sum, tempC) => sum + Math.max(baseC - tempC, 0), 0);
}

/**
 * How far days are warmer than a base, summed.
 *
 *     CDD = Σ max(Tday − base, 0)
 *
 * @param dailyMeansC mean temperature of each day, °C
 * @param baseC base, °C (10 for the climate zones, 18 for cooling)
 * @returns degree-days, K·d
 * @throws EngineInputError when a temperature or the base lies outside −100…100 °C
 * Validity: daily means.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14 (degree-days).
 * @example
 * coolingDegreeDays([10, 18, 25], 10); // 23
 */
export function coolingDegreeDays(dailyMeansC: readonly number[], baseC: number): number {
	requireTemps(dailyMeansC, baseC);
	return dailyMeansC.reduce((sum, tempC) => sum + Math.max(tempC - baseC, 0), 0);
}

function requireTemps(tempsC: readonly number[], baseC: number): void {
	requirePositive({ days: tempsC.length });
	for (const dayMeanC of tempsC) requireWithin(-100, 100, { dayMeanC });
	requireWithin(-100, 100, { baseC });
}

/** Days of the months, February with its leap days. */
const DAYS = [31, 28.25, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31] as const;

/**
 * Degree-days of a year of which only monthly means are known.
 *
 *     D = Σ Nm max(±(Tm − base), 0)      (Nm the days of the month)
 *
 * @param meanC twelve monthly means, °C
 * @param baseC base, °C
 * @param kind above the base (cooling) or below it (heating)
 * @returns degree-days, K·d
 * @throws EngineInputError unless there are twelve means and a base within −100…100 °C
 * Validity: a floor: where the base lies within the spread of a month's days, the true sum is larger, by up to 0.4 times the
 *   standard deviation of the days for each day of that month.
 * Source: closed form; the spread's share is the mean of the positive half of a normal distribution, 1/√(2π).
 * @example
 * degreeDaysOfMonths([20, 20, 20, 20, 20, 20, 20, 20, 20, 20, 20, 20], 10, 'above'); // 3652.5
 */
export function degreeDaysOfMonths(meanC: readonly number[], baseC: number, kind: 'above' | 'below'): number {
	requireWithin(DAYS.length, DAYS.length, { months: meanC.length });
	requireTemps(meanC, baseC);
	const sign = kind === 'above' ? 1 : -1;
	return meanC.reduce((sum, tempC, month) => sum + DAYS[month]! * Math.max(sign * (tempC - baseC), 0), 0);
}
