/** A number that a formula cannot take: says which, what it was and the limit. */
export class EngineInputError extends RangeError {
	override readonly name = 'EngineInputError';
	/** Name of the argument with its unit in it. */
	readonly input: string;
	readonly value: number;
	readonly limit: string;

	constructor(input: string, value: number, limit: string) {
		super(`${input} is ${value}: it must be ${limit}.`);
		this.input = input;
		this.value = value;
		this.limit = limit;
	}
}

type NamedNumbers = Readonly<Record<string, number>>;

function requireEach(values: NamedNumbers, holds: (value: number) => boolean, limit: string): void {
	for (const [input, value] of Object.entries(values)) {
		if (!Number.isFinite(value) || !holds(value)) throw new EngineInputError(input, value, limit);
	}
}

/** Each value is finite and above zero. */
export function requirePositive(values: NamedNumbers): void {
	requireEach(values, (value) => value > 0, 'a finite number above 0');
}

/** Each value is finite and not below the limit. */
export function requireNotBelow(limit: number, values: NamedNumbers): void {
	requireEach(values, (value) => value >= limit, `a finite number, at least ${limit}`);
}

/** Each value lies within the two limits, ends included. */
export function requireWithin(low: number, high: number, values: NamedNumbers): void {
	requireEach(values, (value) => value >= low && value <= high, `within ${low} to ${high}`);
}

/** Each value lies above 0 and is at most 1, as an emissivity does. */
export function requireFraction(values: NamedNumbers): void {
	requireEach(values, (value) => value > 0 && value <= 1, 'above 0 and at most 1');
}
