import {
	DRY_BULB,
	GLOBAL_HORIZONTAL,
	readCell,
	readNeededCell,
	splitCells,
	type CellLimits
} from './read-cells';
import { readDateColumns, type DateColumns } from './read-time';
import type { WeatherHour, WeatherSite } from './weather-file';
import type { ProblemList } from './weather-problem';

/** What each of the first eight lines begins with. */
export const EPW_HEADER = [
	...(['LOCATION', 'DESIGN CONDITIONS', 'TYPICAL/EXTREME PERIODS', 'GROUND TEMPERATURES'] as const),
	...(['HOLIDAYS/DAYLIGHT SAVING', 'COMMENTS 1', 'COMMENTS 2', 'DATA PERIODS'] as const)
] as const;
export const EPW_COLUMNS = 35;

const DATE: DateColumns = { month: 2, day: 3, hour: 4, firstHour: 1 };
const DRY_BULB_CELL: CellLimits = { column: { number: 7, name: 'dry bulb' }, ...DRY_BULB };
const SUN_CELL: CellLimits = { column: { number: 14, name: 'global horizontal' }, ...GLOBAL_HORIZONTAL };

/** Of the LOCATION line. */
const SITE_CELLS = {
	latitudeDeg: { column: { number: 7, name: 'latitude' }, min: -90, max: 90, unit: '°' },
	longitudeDeg: { column: { number: 8, name: 'longitude' }, min: -180, max: 180, unit: '°' },
	altitudeM: { column: { number: 10, name: 'elevation' }, min: -430, max: 6_000, unit: 'm' }
} as const satisfies Record<string, CellLimits>;

/** Of the DATA PERIODS line: one period, one row an hour. */
const PERIOD_CELLS: readonly CellLimits[] = [
	{ column: { number: 2, name: 'data periods' }, min: 1, max: 1, unit: '', isWhole: true },
	{ column: { number: 3, name: 'rows an hour' }, min: 1, max: 1, unit: '', isWhole: true }
];

/** Whether each header line begins as it must. */
function checkKeywords(lines: readonly string[], problems: ProblemList): boolean {
	const wrong = EPW_HEADER.flatMap((keyword, index) => {
		const value = splitCells(lines[index] ?? '')[0] ?? '';
		return value.toUpperCase().startsWith(keyword) ? [] : [{ line: index + 1, value, keyword }];
	});
	for (const { line, value, keyword } of wrong) {
		const column = { number: 1, name: 'keyword' };
		problems.add({ kind: 'wrong-header', line, column, value, limit: `${keyword}, as EPW line ${line}` });
	}
	return wrong.length === 0;
}

function readSite(cells: readonly string[], problems: ProblemList): WeatherSite | null {
	const { latitudeDeg: latitude, longitudeDeg: longitude, altitudeM: altitude } = SITE_CELLS;
	const latitudeDeg = readNeededCell(cells, 1, latitude, problems);
	const longitudeDeg = readNeededCell(cells, 1, longitude, problems);
	const altitudeM = readNeededCell(cells, 1, altitude, problems);
	if (latitudeDeg === undefined || longitudeDeg === undefined || altitudeM === undefined) return null;
	const name = [cells[1], cells[2], cells[3]].filter((part) => part && part !== '-').join(', ');
	return { name, latitudeDeg, longitudeDeg, altitudeM };
}

function readRow(cells: readonly string[], line: number, problems: ProblemList): WeatherHour | null {
	if (cells.length !== EPW_COLUMNS) {
		const value = `${cells.length} columns`;
		problems.add({ kind: 'wrong-columns', line, column: null, value, limit: `${EPW_COLUMNS} columns` });
		return null;
	}
	const hourOfYear = readDateColumns(cells, line, DATE, problems);
	const dryBulbC = readNeededCell(cells, line, DRY_BULB_CELL, problems);
	const sunWPerM2 = readCell(cells, line, SUN_CELL, problems);
	if (hourOfYear === undefined || dryBulbC === undefined || sunWPerM2 === undefined) return null;
	return { line, hourOfYear, dryBulbC, globalHorizontalWPerM2: sunWPerM2 };
}

/** The rows of an EPW file and where it was measured; what is wrong goes into the list. */
export function parseEpw(
	lines: readonly string[],
	problems: ProblemList
): { site: WeatherSite | null; hours: WeatherHour[] } {
	if (!checkKeywords(lines, problems)) return { site: null, hours: [] };
	const site = readSite(splitCells(lines[0] ?? ''), problems);
	const periodsLine = EPW_HEADER.length;
	const periods = splitCells(lines[periodsLine - 1] ?? '');
	for (const limits of PERIOD_CELLS) readNeededCell(periods, periodsLine, limits, problems);
	const hours = lines
		.slice(EPW_HEADER.length)
		.flatMap((line, index) => readRow(splitCells(line), index + EPW_HEADER.length + 1, problems) ?? []);
	return { site, hours };
}
