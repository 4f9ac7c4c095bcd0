/** What can be wrong with a scenario, in one word each. */
export const SCENARIO_ERROR_CODES = {
	wrong_type: 'The value is not of the kind that this field takes.',
	unknown_field: 'No field has this name.',
	missing_field: 'This field has no default and must be given.',
	not_finite: 'The number is infinite or not a number.',
	out_of_range: 'The number lies outside what this field can be.',
	not_a_choice: 'The word is none of those that this field takes.',
	inconsistent: 'Two fields contradict each other.',
	no_legs: 'A day plan needs at least one leg.',
	too_many_legs: 'The day plan has more legs than can be run.',
	too_long: 'The day plan is longer than can be run.'
} as const;
export type ScenarioErrorCode = keyof typeof SCENARIO_ERROR_CODES;

export interface ScenarioFault {
	code: ScenarioErrorCode;
	/** Where: `battery.cellHeatCapacity`, `legs[3].minutes`; empty for the scenario itself. */
	path: string;
	value: unknown;
	/** What would have been right, in words. */
	limit: string;
}

/**
 * A scenario that cannot be simulated: says what, where and the limit, before anything is run.
 *
 * @example
 * new ScenarioError({ code: 'out_of_range', path: 'start.soc', value: 2, limit: '0 to 1' }).message;
 * // 'start.soc is 2: it must be 0 to 1.'
 */
export class ScenarioError extends Error implements ScenarioFault {
	readonly code: ScenarioErrorCode;
	readonly path: string;
	readonly value: unknown;
	readonly limit: string;

	constructor(fault: ScenarioFault) {
		super(describeFault(fault));
		this.name = 'ScenarioError';
		this.code = fault.code;
		this.path = fault.path;
		this.value = fault.value;
		this.limit = fault.limit;
	}
}

function describeFault({ code, path, value, limit }: ScenarioFault): string {
	const where = path === '' ? 'The scenario' : path;
	if (code === 'missing_field') return `${where} is missing: it must be ${limit}.`;
	if (code === 'unknown_field') return `${where} is not a field that a scenario has: ${limit}.`;
	if (code === 'too_long') return `${where} come to ${describeValue(value)} minutes: they must be ${limit}.`;
	if (code === 'too_many_legs' || code === 'no_legs') {
		return `${where} has ${describeValue(value)} entries: it must have ${limit}.`;
	}
	return `${where} is ${describeValue(value)}: it must be ${limit}.`;
}

const LONGEST_SHOWN = 60;
const shorten = (text: string): string =>
	text.length > LONGEST_SHOWN ? `${text.slice(0, LONGEST_SHOWN)}…` : text;

/**
 * A faulty value as JSON can carry it: small ones as they are, large ones and those without a JSON form in words.
 *
 * @param value anything
 * @returns a number, a boolean, null, or a text of at most some sixty characters
 * Validity: every value, however large or deep.
 * Source: our own.
 * @example
 * showValue([1, 2, 3]); // 'a list'
 */
export function showValue(value: unknown): unknown {
	if (value === undefined || value === null || typeof value === 'boolean') return value ?? null;
	if (typeof value === 'number' && Number.isFinite(value)) return value;
	return typeof value === 'string' ? shorten(value) : describeValue(value);
}

/** A value in a few words, however large or deep it is. */
export function describeValue(value: unknown): string {
	if (value === null) return 'null';
	if (Array.isArray(value)) return 'a list';
	if (typeof value === 'object') return 'an object';
	if (typeof value === 'function') return 'a function';
	if (typeof value !== 'string') return String(value);
	return `"${shorten(value)}"`;
}
