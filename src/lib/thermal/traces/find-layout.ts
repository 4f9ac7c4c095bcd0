import { findCellKind } from './cell-kinds';
import { findUnit } from './find-channels';
import { DELIMITERS, type Decimal, type Delimiter } from './mapping';
import { readSampleRows, type SampleRow } from './sample-rows';
import { TraceError } from './trace-error';

/** How the beginning of a file is laid out. */
export interface TraceLayout {
	delimiter: Delimiter;
	decimal: Decimal;
	/** The lines that name the columns, at most a line of names and a line of units. */
	headerRows: SampleRow[];
	/** The rows, each with as many cells as there are columns. */
	rows: SampleRow[];
	columnCount: number;
}

const COMMENT = /^\s*(#|\/\/|%|;)\s*/;

/** A row has a time and a value, and hardly words. */
function isRow({ cells }: SampleRow): boolean {
	const kinds = cells.map(findCellKind);
	const told = kinds.filter((kind) => kind !== 'text' && kind !== 'blank').length;
	return told >= 2 && kinds.filter((kind) => kind === 'text').length < kinds.length / 2;
}

function findCommonest(counts: readonly number[]): number {
	const times = new Map<number, number>();
	for (const count of counts) times.set(count, (times.get(count) ?? 0) + 1);
	return [...times].sort((a, b) => b[1] - a[1] || b[0] - a[0])[0]?.[0] ?? 0;
}

interface Trial {
	delimiter: Delimiter;
	all: SampleRow[];
	rows: SampleRow[];
	columnCount: number;
}

function tryDelimiter(text: string, delimiter: Delimiter): Trial {
	const all = readSampleRows(text, delimiter);
	const candidates = all.filter(isRow);
	const columnCount = findCommonest(candidates.map(({ cells }) => cells.length));
	const rows = candidates.filter(({ cells }) => cells.length === columnCount);
	return { delimiter, all, rows, columnCount };
}

function findDecimal(rows: readonly SampleRow[]): Decimal {
	const numbers = rows.flatMap(({ cells }) => cells.filter((cell) => findCellKind(cell) === 'number'));
	const commas = numbers.filter((cell) => cell.includes(',')).length;
	return commas > numbers.filter((cell) => cell.includes('.')).length ? ',' : '.';
}

const withoutComment = ({ line, cells }: SampleRow): SampleRow => ({
	line,
	cells: cells.map((cell, at) => (at === 0 ? cell.replace(COMMENT, '') : cell))
});

/** What stands in the place of a unit under a time: yyyy-mm-dd hh:mm:ss */
const TIME_FORM = /^[dmyhs:./\-\s]+$/i;
const LONGEST_OTHER_UNIT = 5;

/** A line of units alone stands under the line of names. */
const isUnitLine = ({ cells }: SampleRow): boolean =>
	cells.some((cell) => findUnit(cell) !== null) &&
	cells.every((cell) => cell.length <= LONGEST_OTHER_UNIT || findUnit(cell) !== null || TIME_FORM.test(cell));

function findHeader({ all, rows, columnCount }: Trial): SampleRow[] {
	const first = all.findIndex(({ line }) => line === rows[0]!.line);
	const above = all
		.slice(0, first)
		.filter(({ cells }) => cells.some((cell) => cell !== ''))
		.reverse();
	const isNames = (row: SampleRow | undefined): row is SampleRow =>
		row !== undefined &&
		Math.abs(row.cells.length - columnCount) <= 1 &&
		row.cells.length >= 2 &&
		!isRow(row);
	const [last, before] = above;
	if (!isNames(last)) return [];
	const header = isUnitLine(last) && isNames(before) ? [before, last] : [last];
	return header.map(withoutComment);
}

/** The delimiter that makes most rows of the text, and what follows from it. */
export function findLayout(text: string): TraceLayout {
	const trials = DELIMITERS.map((delimiter) => tryDelimiter(text, delimiter));
	const best = trials.reduce((a, b) =>
		b.rows.length * b.columnCount > a.rows.length * a.columnCount ? b : a
	);
	if (best.rows.length === 0) {
		const [first] = best.all.filter(({ cells }) => cells.some((cell) => cell !== ''));
		throw new TraceError({
			...{ code: 'no_numeric_rows', line: first?.line ?? null, column: null },
			...{ value: first?.cells.join(best.delimiter) ?? '', limit: 'rows with a time and a number' }
		});
	}
	const { delimiter, rows, columnCount } = best;
	return { delimiter, decimal: findDecimal(rows), headerRows: findHeader(best), rows, columnCount };
}
