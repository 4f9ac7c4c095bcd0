import { requireNotBelow, requireWithin } from './require';

/** Averages of a place over years, January to December. */
export interface MonthlyClimate {
	/** Mean air temperature, °C. */
	meanC: readonly number[];
	/** Rain and melted snow, mm. */
	rainMm: readonly number[];
}

export const MONTHS = 12;
/** October to March, and April to September, as positions in a year that begins in January. */
const HALVES = { octoberToMarch: [9, 10, 11, 0, 1, 2], aprilToSeptember: [3, 4, 5, 6, 7, 8] } as const;

/** Twelve months of numbers that a place on the earth can have. */
export function requireMonthlyClimate({ meanC, rainMm }: MonthlyClimate): void {
	requireWithin(MONTHS, MONTHS, { monthsOfMeanC: meanC.length, monthsOfRainMm: rainMm.length });
	for (const monthMeanC of meanC) requireWithin(-80, 50, { monthMeanC });
	for (const monthRainMm of rainMm) requireNotBelow(0, { monthRainMm });
}

export const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
export const mean = (values: readonly number[]): number => sum(values) / values.length;

/** The months of the warmer and of the cooler half of the year; of two equally warm the one from October counts as summer. */
export function splitYear(meanC: readonly number[]): {
	summer: readonly number[];
	winter: readonly number[];
} {
	const warmth = (half: readonly number[]) => sum(half.map((month) => meanC[month]!));
	const { octoberToMarch, aprilToSeptember } = HALVES;
	return warmth(octoberToMarch) >= warmth(aprilToSeptember)
		? { summer: octoberToMarch, winter: aprilToSeptember }
		: { summer: aprilToSeptember, winter: octoberToMarch };
}

/**
 * Yearly mean of monthly means.
 *
 *     T = Σ Ti / 12
 *
 * @param climate twelve monthly means, °C, and rain, mm
 * @returns mean temperature, °C
 * @throws EngineInputError unless there are twelve months of temperatures within −80…50 °C and rain not below zero
 * Validity: months count alike, as the classification of climates has it.
 * Source: Peel, Finlayson, McMahon, Hydrology and Earth System Sciences 11 (2007) 1633, Table 1.
 * @example
 * yearlyMeanC({ meanC: [0, 0, 0, 0, 0, 12, 12, 0, 0, 0, 0, 0], rainMm: [1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1] }); // 2
 */
export function yearlyMeanC(climate: MonthlyClimate): number {
	requireMonthlyClimate(climate);
	return mean(climate.meanC);
}

/**
 * Yearly rain below which a climate is dry.
 *
 *     P = 20 T + { 0 when 70 % of the rain falls in winter, 280 when 70 % falls in summer, 140 otherwise }      (mm, T in °C)
 *
 * @param climate twelve monthly means, °C, and rain, mm
 * @returns P, mm a year; below half of it the place is a desert
 * @throws EngineInputError unless there are twelve months of temperatures within −80…50 °C and rain not below zero
 * Validity: summer is the warmer of April to September and October to March.
 * Source: Peel, Finlayson, McMahon, Hydrology and Earth System Sciences 11 (2007) 1633, Table 1 (ten times its Pthreshold).
 * @example
 * drynessLimitMm({ meanC: [20, 20, 20, 20, 20, 20, 20, 20, 20, 20, 20, 20], rainMm: [9, 9, 9, 9, 9, 9, 9, 9, 9, 9, 9, 9] }); // 540
 */
export function drynessLimitMm(climate: MonthlyClimate): number {
	requireMonthlyClimate(climate);
	const { summer, winter } = splitYear(climate.meanC);
	const rainOf = (half: readonly number[]) => sum(half.map((month) => climate.rainMm[month]!));
	const yearMm = sum(climate.rainMm);
	const base = 20 * mean(climate.meanC);
	if (rainOf(winter) >= 0.7 * yearMm) return base;
	return rainOf(summer) >= 0.7 * yearMm ? base + 280 : base + 140;
}
