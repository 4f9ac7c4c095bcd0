import { sampleQuantile } from '../statistics/sample-quantile';
import { standardDeviation } from '../statistics/standard-deviation';
import { HOURS_A_DAY, MONTH_NAMES, monthOfDay } from './calendar';
import type { WeatherHour } from './weather-file';

/** What a place keeps of a year of weather. */
export interface WeatherFigures {
	/** Mean of the daily highest, January to December, °C. */
	monthlyMaxC: number[];
	/** Standard deviation of the daily highest, January to December, K. */
	monthlySpreadK: number[];
	hotDayMaxC: number;
	dailyRangeK: number;
	/** Null where the file does not say for every hour of the hottest month. */
	sunPeakWPerM2: number | null;
	/** 0 for January. */
	hottestMonth: number;
}

/** Share of the hours of a year that are hotter than the design dry bulb. */
const DESIGN_SHARE = 0.004;

interface Day {
	month: number;
	highestC: number;
	lowestC: number;
}

function gatherDays(hours: readonly WeatherHour[]): Day[] {
	const days = new Map<number, Day>();
	for (const { hourOfYear, dryBulbC } of hours) {
		const dayOfYear = Math.floor(hourOfYear / HOURS_A_DAY);
		const day = days.get(dayOfYear);
		if (!day) {
			days.set(dayOfYear, { month: monthOfDay(dayOfYear), highestC: dryBulbC, lowestC: dryBulbC });
			continue;
		}
		day.highestC = Math.max(day.highestC, dryBulbC);
		day.lowestC = Math.min(day.lowestC, dryBulbC);
	}
	return [...days.values()];
}

const mean = (values: readonly number[]): number =>
	values.reduce((sum, value) => sum + value, 0) / values.length;

function findHottestMonth(hours: readonly WeatherHour[]): number {
	const means = MONTH_NAMES.map((_, month) =>
		mean(hours.filter((hour) => isIn(hour, month)).map(({ dryBulbC }) => dryBulbC))
	);
	return means.indexOf(Math.max(...means));
}

const isIn = ({ hourOfYear }: WeatherHour, month: number): boolean =>
	monthOfDay(Math.floor(hourOfYear / HOURS_A_DAY)) === month;

function findSunPeak(hours: readonly WeatherHour[]): number | null {
	const values = hours.map(({ globalHorizontalWPerM2 }) => globalHorizontalWPerM2);
	const known = values.filter((value) => value !== null);
	return known.length === values.length ? Math.max(...known) : null;
}

/**
 * What a place keeps of a year of hourly weather: its months, and the hot day to plan for.
 *
 *     month     mean and standard deviation of the highest of each day
 *     hot day   highest:  the dry bulb that 0.4 % of the hours of the year exceed (35 of 8,760)
 *               range:    mean of highest − lowest over the days of the hottest month, which is that of the highest mean
 *               sun:      the brightest hour of the hottest month on a level plane
 *
 * @param hours one whole year, each hour once
 * @returns monthly means in °C and spreads in K, the hot day in °C, K and W/m²
 * Validity: one year, typical or real: the handbook counts hours over many years, and one year gives its design dry bulb to
 *   about 1 K. The spread is that of the days within one month of one year, without that from year to year. A mean over an hour
 *   of sun is up to 2 % below the brightest moment.
 * Source: ASHRAE Handbook Fundamentals, ch. 14, annual cooling design conditions (0.4 % dry bulb, hottest month, mean daily
 *   range; from memory); the sun is engineering judgement, no source.
 * @example
 * const hours = Array.from({ length: 8784 }, (_, h) => ({ line: h + 2, hourOfYear: h, dryBulbC: h % 24, globalHorizontalWPerM2: null }));
 * deriveWeatherFigures(hours).dailyRangeK; // 23
 */
export function deriveWeatherFigures(hours: readonly WeatherHour[]): WeatherFigures {
	const days = gatherDays(hours);
	const byMonth = MONTH_NAMES.map((_, month) => days.filter((day) => day.month === month));
	const highestOf = (month: readonly Day[]): number[] => month.map(({ highestC }) => highestC);
	const hottestMonth = findHottestMonth(hours);
	const temperaturesC = hours.map(({ dryBulbC }) => dryBulbC);
	return {
		monthlyMaxC: byMonth.map((month) => mean(highestOf(month))),
		monthlySpreadK: byMonth.map((month) => standardDeviation(highestOf(month))),
		hotDayMaxC: sampleQuantile(temperaturesC, 1 - DESIGN_SHARE),
		dailyRangeK: mean(byMonth[hottestMonth]!.map(({ highestC, lowestC }) => highestC - lowestC)),
		sunPeakWPerM2: findSunPeak(hours.filter((hour) => isIn(hour, hottestMonth))),
		hottestMonth
	};
}
