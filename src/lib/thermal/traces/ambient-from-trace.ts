import type { ClimateGroup } from '../types';
import { ambientTempC } from '../vehicle/climate';
import { minuteBins, type BinnedTrace } from './binned-trace';
import { clockHourAt } from './plan-from-legs';

export interface MeasuredAmbient {
	/** Clock hour of the first minute; null where the trace does not tell the time of day. */
	startHour: number | null;
	/** °C a minute, NaN where nothing was measured. */
	tempC: Float32Array;
	/** The design day that fits best; null where there is none in the trace. */
	climate: Pick<ClimateGroup, 'tMax' | 'dailyRange'> | null;
	/** Why there is none: no hour is told, too little of a day is seen, or the air was no warmer at the hotter hours. */
	whyNone: 'no-hour' | 'too-little' | 'unlike-a-day' | null;
	/** How far the measured minutes lie from that day, root mean square, K; NaN without one. */
	offByK: number;
}

/** The trace must see so much of the way from the coolest to the hottest hour of the day. */
const LEAST_SHARE_SEEN = 0.5;
const MINUTES_PER_H = 60;
const UNIT_DAY = { tMax: 0, dailyRange: 1 } as const;

interface Line {
	intercept: number;
	slope: number;
}

/** y = intercept + slope x by least squares; null where x hardly varies. */
function fitLine(x: readonly number[], y: readonly number[]): Line | null {
	const mean = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
	const low = x.reduce((a, b) => Math.min(a, b), Infinity);
	const high = x.reduce((a, b) => Math.max(a, b), -Infinity);
	if (!(high - low >= LEAST_SHARE_SEEN)) return null;
	const [meanX, meanY] = [mean(x), mean(y)];
	const slope =
		x.reduce((sum, value, at) => sum + (value - meanX) * (y[at]! - meanY), 0) /
		x.reduce((sum, value) => sum + (value - meanX) ** 2, 0);
	return { intercept: meanY - slope * meanX, slope };
}

/**
 * The air outside as a trace measured it, minute by minute, and the design day that is nearest to it.
 *
 *     T ≈ tMax − dailyRange f(h),   both by least squares over the minutes measured
 *
 * @param trace as it is kept
 * @param startHour clock hour of its beginning, where it does not tell the time of day itself
 * @returns minutes and design day; null where the trace has no ambient channel
 * @throws EngineInputError where the bins are longer than a minute
 * Validity: a fair day. The day is fitted only where the trace sees half of the way from its coolest to its hottest hour and the
 *   air was warmer at the hotter hours; a sensor near the bonnet reads too warm at stops. Clock time is taken for solar time.
 * Source: ASHRAE Handbook Fundamentals 2021, ch. 14, Table 6, for f; least squares.
 * @example
 * const airC = Array.from({ length: 1440 }, (_, minute) => ambientTempC(minute / 60, { tMax: 40, dailyRange: 14 }));
 * const bins = { count: airC.map(() => 1), mean: airC, min: airC, max: airC };
 * const base = { timeBase: 'time-of-day', timeZone: null, startS: 0, stepS: 60, binCount: 1440 };
 * ambientFromTrace({ ...base, channels: { ambientC: bins } }).climate.dailyRange; // 14
 */
export function ambientFromTrace(trace: BinnedTrace, startHour?: number): MeasuredAmbient | null {
	const bins = minuteBins(trace).channels.ambientC;
	if (!bins) return null;
	const fromHour = startHour ?? clockHourAt(trace, trace.startS);
	const tempC = Float32Array.from(bins.mean);
	const without = (whyNone: MeasuredAmbient['whyNone']): MeasuredAmbient => ({
		...{ startHour: fromHour, tempC, climate: null, whyNone, offByK: NaN }
	});
	if (fromHour === null) return without('no-hour');
	const told = Array.from(tempC.keys()).filter((minute) => !Number.isNaN(tempC[minute]));
	// The middle of each minute; f itself is what a day with a highest of 0 and a range of 1 lies below it.
	const belowHottest = told.map((minute) =>
		ambientTempC(fromHour + (minute + 0.5) / MINUTES_PER_H, UNIT_DAY)
	);
	const measured = told.map((minute) => tempC[minute]!);
	const line = fitLine(belowHottest, measured);
	if (line === null) return without('too-little');
	if (line.slope < 0) return without('unlike-a-day');
	const squares = measured.map((value, at) => (value - line.intercept - line.slope * belowHottest[at]!) ** 2);
	const offByK = Math.sqrt(squares.reduce((sum, square) => sum + square, 0) / squares.length);
	return { ...without(null), climate: { tMax: line.intercept, dailyRange: line.slope }, offByK };
}
