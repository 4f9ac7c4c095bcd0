import type { WeatherProblem } from './weather-problem';

/** One hour of a weather file. */
export interface WeatherHour {
	/** The line that it stands on, counted from 1. */
	line: number;
	/** The hour that begins then, 0 at 1 January 00:00, in a year with a 29 February. */
	hourOfYear: number;
	dryBulbC: number;
	/** Mean of the hour on a level plane; null where the file does not say. */
	globalHorizontalWPerM2: number | null;
}

/** Where the file says that its weather was. */
export interface WeatherSite {
	name: string;
	latitudeDeg: number;
	longitudeDeg: number;
	altitudeM: number;
}

export interface WeatherFile {
	format: 'epw' | 'csv';
	/** Null where the format does not say. */
	site: WeatherSite | null;
	/** One whole year in order, with or without 29 February. */
	hours: WeatherHour[];
}

export type ParsedWeather =
	| { ok: true; file: WeatherFile }
	/** The first problems, and how many there are in all. */
	| { ok: false; problems: WeatherProblem[]; problemCount: number };

export const FEWEST_HOURS = 8_760;
export const MOST_HOURS = 9_000;
export const MOST_WEATHER_BYTES = 5 * 1024 * 1024;
