/** What can be wrong with a trace or with what is kept of one, in one word each. */
export const TRACE_ERROR_CODES = {
	binary_content: 'The file holds bytes that no text has.',
	no_time_column: 'No column tells the time.',
	no_numeric_rows: 'No row has a time and a number.',
	too_few_rows: 'There are too few rows to draw a line through.',
	too_many_rows: 'There are more rows than can be read.',
	too_many_bytes: 'The file is larger than can be read.',
	row_too_long: 'A row does not end.',
	too_long: 'The trace covers more time than can be read.',
	wrong_mapping: 'What is said of the columns cannot be.',
	no_such_zone: 'No time zone has this name.',
	wrong_code: 'The bytes are not a trace that was kept.'
} as const;
export type TraceErrorCode = keyof typeof TRACE_ERROR_CODES;

export interface TraceFault {
	code: TraceErrorCode;
	/** Counted from 1; null where it concerns the file as a whole. */
	line: number | null;
	/** Counted from 1; null where it concerns the line as a whole. */
	column: number | null;
	/** What was found, in words. */
	value: string;
	/** What would have been right, in words. */
	limit: string;
}

const LONGEST_VALUE = 40;

/** A value as it can be shown: cut short, with a dot for what does not show. */
export function shortenValue(value: string): string {
	const shown = value.replace(/\p{C}/gu, '·');
	return shown.length > LONGEST_VALUE ? `${shown.slice(0, LONGEST_VALUE)}…` : shown;
}

function sayWhere({ line, column }: Pick<TraceFault, 'line' | 'column'>): string {
	if (line === null) return 'The trace';
	return column === null ? `Line ${line}` : `Line ${line}, column ${column}`;
}

/**
 * A trace that cannot be read, or not be kept: says what, where and the limit.
 *
 * @example
 * const where = { line: 3, column: 2 };
 * new TraceError({ code: 'binary_content', ...where, value: 'a zero byte', limit: 'text' }).message;
 * // 'Line 3, column 2: found a zero byte; needed: text.'
 */
export class TraceError extends Error implements TraceFault {
	override readonly name = 'TraceError';
	readonly code: TraceErrorCode;
	readonly line: number | null;
	readonly column: number | null;
	readonly value: string;
	readonly limit: string;

	constructor({ code, line, column, value, limit }: TraceFault) {
		const short = shortenValue(value);
		super(`${sayWhere({ line, column })}: found ${short === '' ? 'nothing' : short}; needed: ${limit}.`);
		this.code = code;
		this.line = line;
		this.column = column;
		this.value = short;
		this.limit = limit;
	}
}

/** The whole trace has this fault. */
export function faultOfWhole(code: TraceErrorCode, value: string, limit: string): TraceError {
	return new TraceError({ code, line: null, column: null, value, limit });
}
