import {
	DRY_BULB,
	GLOBAL_HORIZONTAL,
	readCell,
	readNeededCell,
	splitCells,
	type CellLimits
} from './read-cells';
import { readDateColumns, readTimeColumn } from './read-time';
import type { WeatherHour } from './weather-file';
import type { ProblemList } from './weather-problem';

/** The names that the first line may have; others are passed over. */
export const CSV_NAMES = {
	...{ time: 'time', month: 'month', day: 'day', hour: 'hour' },
	...{ dryBulb: 'dry_bulb_c', sun: 'global_horizontal_w_per_m2' }
} as const;

interface CsvColumns {
	count: number;
	readHour: (cells: readonly string[], line: number, problems: ProblemList) => number | undefined;
	dryBulb: CellLimits;
	sun: CellLimits | null;
}

const TIME_LIMIT = `a header with ${CSV_NAMES.time}, or with ${CSV_NAMES.month}, ${CSV_NAMES.day} and ${CSV_NAMES.hour}`;
const TEMPERATURE_LIMIT = `a header with ${CSV_NAMES.dryBulb}`;

function findHourReader(numberOf: (name: string) => number): CsvColumns['readHour'] | null {
	const time = numberOf(CSV_NAMES.time);
	if (time > 0) return (cells, line, problems) => readTimeColumn(cells, line, time, problems);
	const [month, day, hour] = [CSV_NAMES.month, CSV_NAMES.day, CSV_NAMES.hour].map(numberOf) as [
		number,
		number,
		number
	];
	if (month === 0 || day === 0 || hour === 0) return null;
	const date = { month, day, hour, firstHour: 0 } as const;
	return (cells, line, problems) => readDateColumns(cells, line, date, problems);
}

/** A name that stands twice leaves open which of the two is meant. */
function tellRepeatedNames(names: readonly string[], problems: ProblemList): void {
	const known: readonly string[] = Object.values(CSV_NAMES);
	names.forEach((name, index) => {
		if (!known.includes(name) || names.indexOf(name) === index) return;
		const column = { number: index + 1, name };
		const limit = `each name once, and column ${names.indexOf(name) + 1} has it already`;
		problems.add({ kind: 'wrong-header', line: 1, column, value: name, limit });
	});
}

function readHeader(line: string, problems: ProblemList): CsvColumns | null {
	const names = splitCells(line).map((name) => name.toLowerCase());
	tellRepeatedNames(names, problems);
	const numberOf = (name: string): number => names.indexOf(name) + 1;
	const readHour = findHourReader(numberOf);
	const dryBulb = numberOf(CSV_NAMES.dryBulb);
	const sun = numberOf(CSV_NAMES.sun);
	const wrong = { kind: 'wrong-header', line: 1, column: null, value: line.trim() } as const;
	if (!readHour) problems.add({ ...wrong, limit: TIME_LIMIT });
	if (dryBulb === 0) problems.add({ ...wrong, limit: TEMPERATURE_LIMIT });
	if (!readHour || problems.count > 0) return null;
	return {
		count: names.length,
		readHour,
		dryBulb: { column: { number: dryBulb, name: CSV_NAMES.dryBulb }, ...DRY_BULB },
		sun: sun === 0 ? null : { column: { number: sun, name: CSV_NAMES.sun }, ...GLOBAL_HORIZONTAL }
	};
}

function readRow(
	cells: readonly string[],
	line: number,
	columns: CsvColumns,
	problems: ProblemList
): WeatherHour | null {
	if (cells.length !== columns.count) {
		const limit = `${columns.count} columns, as the header has`;
		problems.add({ kind: 'wrong-columns', line, column: null, value: `${cells.length} columns`, limit });
		return null;
	}
	const hourOfYear = columns.readHour(cells, line, problems);
	const dryBulbC = readNeededCell(cells, line, columns.dryBulb, problems);
	const sunWPerM2 = columns.sun === null ? null : readCell(cells, line, columns.sun, problems);
	if (hourOfYear === undefined || dryBulbC === undefined || sunWPerM2 === undefined) return null;
	return { line, hourOfYear, dryBulbC, globalHorizontalWPerM2: sunWPerM2 };
}

/** The rows of a CSV file whose first line names its columns; what is wrong goes into the list. */
export function parseCsv(lines: readonly string[], problems: ProblemList): WeatherHour[] {
	const columns = readHeader(lines[0] ?? '', problems);
	if (columns === null) return [];
	return lines
		.slice(1)
		.flatMap((line, index) => readRow(splitCells(line), index + 2, columns, problems) ?? []);
}
