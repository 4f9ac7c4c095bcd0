import type { ProblemList, WeatherColumn } from './weather-problem';

export interface CellLimits {
	column: WeatherColumn;
	min: number;
	max: number;
	unit: string;
	/** Months, days and hours have no fractions. */
	isWhole?: boolean;
	/** From here on a value stands for "not known". */
	missingFrom?: number;
}

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i;
const MINUS = '\u2212';

const sayLimit = (value: number): string => String(value).replace('-', MINUS);

/** "a number within −90 to 60 °C" */
export function sayLimits({ min, max, unit, isWhole }: CellLimits): string {
	const what = isWhole ? 'a whole number' : 'a number';
	return `${what} within ${sayLimit(min)} to ${sayLimit(max)}${unit ? ` ${unit}` : ''}`;
}

/** The cells of a line: parted by commas, without the blanks and the quotation marks around them. */
export function splitCells(line: string): string[] {
	return line.split(',').map((cell) =>
		cell
			.trim()
			.replace(/^"(.*)"$/, '$1')
			.trim()
	);
}

/** The number in a cell; null when it is not known, undefined when the cell is wrong, which the list then tells. */
export function readCell(
	cells: readonly string[],
	line: number,
	limits: CellLimits,
	problems: ProblemList
): number | null | undefined {
	const { column, min, max, isWhole, missingFrom = Infinity } = limits;
	const value = cells[column.number - 1] ?? '';
	const number = NUMBER.test(value) ? Number(value) : NaN;
	if (value === '' || number >= missingFrom) return null;
	const found = { line, column, value, limit: sayLimits(limits) };
	if (Number.isNaN(number) || (isWhole && !Number.isInteger(number))) {
		problems.add({ kind: 'not-a-number', ...found });
		return undefined;
	}
	if (number < min || number > max) {
		problems.add({ kind: 'outside-limits', ...found });
		return undefined;
	}
	return number;
}

/** The same for a cell that must be there. */
export function readNeededCell(
	cells: readonly string[],
	line: number,
	limits: CellLimits,
	problems: ProblemList
): number | undefined {
	const number = readCell(cells, line, limits, problems);
	if (number !== null) return number;
	const { column } = limits;
	const value = cells[column.number - 1] ?? '';
	const marker = value === '' ? '' : `; ${value} stands for “not known”`;
	problems.add({ kind: 'missing-value', line, column, value, limit: `${sayLimits(limits)}${marker}` });
	return undefined;
}

/** Temperature and sun, whatever the column they stand in. */
export const DRY_BULB = { min: -90, max: 60, unit: '°C', missingFrom: 99.9 } as const;
export const GLOBAL_HORIZONTAL = { min: 0, max: 1_400, unit: 'W/m²', missingFrom: 9_999 } as const;
