import { checkHours, checkRowCount } from './check-hours';
import { CSV_NAMES, parseCsv } from './parse-csv';
import { EPW_HEADER, parseEpw } from './parse-epw';
import { splitCells } from './read-cells';
import { MOST_HOURS, MOST_WEATHER_BYTES, type ParsedWeather, type WeatherFile } from './weather-file';
import { ProblemList } from './weather-problem';

function splitLines(text: string): string[] {
	return text
		.replace(/^\uFEFF/, '')
		.replace(/\s+$/, '')
		.split(/\r\n|\n|\r/);
}

/** An EPW file is known by any of its header lines, so that one wrong line can be told. */
function findFormat(lines: readonly string[]): WeatherFile['format'] | null {
	const names = splitCells(lines[0] ?? '').map((name) => name.toLowerCase());
	if (Object.values(CSV_NAMES).some((name) => names.includes(name))) return 'csv';
	const isEpw = EPW_HEADER.some((keyword, at) => lines[at]?.trim().toUpperCase().startsWith(keyword));
	return isEpw ? 'epw' : null;
}

const UNKNOWN_LIMIT = `LOCATION, as an EPW file begins, or a header with ${CSV_NAMES.time} and ${CSV_NAMES.dryBulb}`;

function readRows(
	format: WeatherFile['format'],
	lines: readonly string[],
	problems: ProblemList
): WeatherFile {
	const headerLines = format === 'epw' ? EPW_HEADER.length : 1;
	const rows = lines.length - headerLines;
	// A file that is far too long is not read to its end.
	const read = lines.slice(0, headerLines + MOST_HOURS);
	const { site, hours } =
		format === 'epw' ? parseEpw(read, problems) : { site: null, hours: parseCsv(read, problems) };
	const hasHeader = !problems.told.some(({ kind }) => kind === 'wrong-header');
	if (hasHeader) checkRowCount(rows, problems);
	// Whether an hour is missing can be said only where every row tells its hour.
	if (hours.length === rows) checkHours(hours, problems);
	return { format, site, hours: hours.sort((a, b) => a.hourOfYear - b.hourOfYear) };
}

/**
 * Reads an hourly weather file: EPW, or CSV with named columns (`time`, or `month`, `day` and `hour` 0 to 23; `dry_bulb_c`;
 * `global_horizontal_w_per_m2` if it is known). All of it is good, or every problem is told with its line, column, value and limit.
 *
 * @param text the whole file
 * @returns the hours of one year in order, with the site where an EPW file names it; or the first 20 problems and their count
 * Validity: one row an hour, 8,760 to 9,000 rows, at most 5 MB; temperatures within −90 to 60 °C. Years are not looked at: a
 *   year put together from months of several years is a year. 29 February may be there, whole, or not.
 * Source: EnergyPlus, Auxiliary Programs, EnergyPlus Weather File (EPW) Data Dictionary: eight header lines, 35 columns, hours
 *   1 to 24 by their end, missing from 99.9 (dry bulb) and from 9999 (radiation).
 * @example
 * parseWeatherFile('time,dry_bulb_c').ok; // false
 */
export function parseWeatherFile(text: string): ParsedWeather {
	const problems = new ProblemList();
	if (text.length > MOST_WEATHER_BYTES) {
		problems.addWhole('too-large', `${text.length} characters`, `at most ${MOST_WEATHER_BYTES} characters`);
		return { ok: false, problems: problems.told, problemCount: problems.count };
	}
	const lines = splitLines(text);
	const format = findFormat(lines);
	if (format === null) {
		const found = { line: 1, column: null, value: lines[0] ?? '', limit: UNKNOWN_LIMIT };
		problems.add({ kind: 'wrong-header', ...found });
		return { ok: false, problems: problems.told, problemCount: problems.count };
	}
	const file = readRows(format, lines, problems);
	if (problems.count === 0) return { ok: true, file };
	return { ok: false, problems: problems.told, problemCount: problems.count };
}
