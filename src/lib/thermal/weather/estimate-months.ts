import { cosDeg } from '../correlations/angles';
import { requireWithin } from '../correlations/require';
import { MONTH_NAMES } from './calendar';

/** What is known of a place that has no figures for its months. */
export interface KnownOfPlace {
	latitudeDeg: number;
	hotDayMaxC: number;
}

/** Mean of the daily highest in °C and its spread from day to day in K. */
export interface EstimatedMonth {
	meanMaxC: number;
	spreadK: number;
}

/** From day to day within a month. */
const SPREAD_K = 3.5;
/** How many spreads the hot day lies above the mean of the hottest month. */
const HOT_DAY_SPREADS = 2;
/** Half of the way from the coolest month to the hottest: at the equator, and for each degree away from it. */
const SEASON = { atEquatorK: 2, perDegreeK: 0.18 } as const;
const JANUARY = 0;
const JULY = 6;

/**
 * Daily highest temperatures month by month, where only the latitude and the hot day are known.
 *
 *     T(m) = Thot − 2 s − A [1 − cos(30° (m − m₀))],   A = 2 + 0.18 |φ|,   s = 3.5 K
 *     m₀ = January south of the equator, July north of it and on it
 *
 * @param place latitude φ in ° (north is positive), highest of the hot day Thot in °C
 * @returns mean in °C and spread in K of the daily highest, January to December
 * @throws EngineInputError for a latitude outside −90…90° or a hot day outside −20…60 °C
 * Validity: engineering judgement, no source. Latitudes to 60°, hot days of 25 to 48 °C, places with one summer and one winter.
 *   Against the monthly means of ten stations, set equal in the hottest month, half the way from summer to winter is off by
 *   2 K (root mean square) and 3.5 K at most, a single month by 2.6 K and 7.1 K at most: by the sea (Cape Town) and where rain
 *   ends the heat early (Johannesburg, New Delhi) winters and springs are warmer than this.
 * Source: engineering judgement, no source; compared with reference-data/climate.
 * @example
 * estimateMonths({ latitudeDeg: -25, hotDayMaxC: 42 })[0].meanMaxC; // 35
 * estimateMonths({ latitudeDeg: -25, hotDayMaxC: 42 })[6].meanMaxC; // 22
 */
export function estimateMonths({ latitudeDeg, hotDayMaxC }: KnownOfPlace): EstimatedMonth[] {
	requireWithin(-90, 90, { latitudeDeg });
	requireWithin(-20, 60, { hotDayMaxC });
	const seasonK = SEASON.atEquatorK + SEASON.perDegreeK * Math.abs(latitudeDeg);
	const hottestC = hotDayMaxC - HOT_DAY_SPREADS * SPREAD_K;
	const hottestMonth = latitudeDeg < 0 ? JANUARY : JULY;
	const degreesAMonth = 360 / MONTH_NAMES.length;
	return MONTH_NAMES.map((_, month) => ({
		meanMaxC: hottestC - seasonK * (1 - cosDeg(degreesAMonth * (month - hottestMonth))),
		spreadK: SPREAD_K
	}));
}
