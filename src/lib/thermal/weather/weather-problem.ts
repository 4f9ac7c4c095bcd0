/** What can be wrong with a weather file. */
export type WeatherProblemKind =
	| 'wrong-header'
	| 'wrong-columns'
	| 'not-a-number'
	| 'outside-limits'
	| 'missing-value'
	| 'no-such-time'
	| 'missing-hours'
	| 'repeated-hour'
	| 'too-few-hours'
	| 'too-many-hours'
	| 'too-large';

export interface WeatherColumn {
	/** Counted from 1. */
	number: number;
	name: string;
}

export interface WeatherProblem {
	kind: WeatherProblemKind;
	/** Counted from 1; null where it concerns the file as a whole. */
	line: number | null;
	column: WeatherColumn | null;
	/** What was found, cut short, with a dot for what does not show. */
	value: string;
	/** What is needed instead. */
	limit: string;
	/** All of it in one sentence. */
	message: string;
}

export const MOST_PROBLEMS_TOLD = 20;
const LONGEST_VALUE = 40;

function sayWhere({ line, column }: Pick<WeatherProblem, 'line' | 'column'>): string {
	if (line === null) return 'The file';
	return column === null ? `Line ${line}` : `Line ${line}, column ${column.number} (${column.name})`;
}

type Found = Omit<WeatherProblem, 'message'>;

/** Every problem is counted; the first ones are told. */
export class ProblemList {
	readonly told: WeatherProblem[] = [];
	count = 0;

	add({ value, ...rest }: Found): void {
		this.count++;
		if (this.told.length >= MOST_PROBLEMS_TOLD) return;
		const shown = value.replace(/\p{C}/gu, '·');
		const short = shown.length > LONGEST_VALUE ? `${shown.slice(0, LONGEST_VALUE)}…` : shown;
		const found = short === '' ? 'nothing' : short;
		const message = `${sayWhere(rest)}: found ${found}; needed: ${rest.limit}.`;
		this.told.push({ ...rest, value: short, message });
	}

	/** The whole file has this problem. */
	addWhole(kind: WeatherProblemKind, value: string, limit: string): void {
		this.add({ kind, line: null, column: null, value, limit });
	}
}
