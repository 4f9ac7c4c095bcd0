/** Weather files and what a place keeps of them; months where there is no file. */
export { MONTH_NAMES } from './calendar';
export { estimateMonths, type EstimatedMonth, type KnownOfPlace } from './estimate-months';
export { CSV_NAMES } from './parse-csv';
export { parseWeatherFile } from './parse-weather-file';
export {
	FEWEST_HOURS,
	MOST_HOURS,
	MOST_WEATHER_BYTES,
	type ParsedWeather,
	type WeatherFile,
	type WeatherHour,
	type WeatherSite
} from './weather-file';
export { deriveWeatherFigures, type WeatherFigures } from './weather-figures';
export { MOST_PROBLEMS_TOLD, type WeatherProblem, type WeatherProblemKind } from './weather-problem';
