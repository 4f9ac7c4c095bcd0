import { EngineInputError } from '../correlations/require';

/** Each value is a whole number within the two limits, ends included. */
export function requireWhole(low: number, high: number, values: Readonly<Record<string, number>>): void {
	for (const [input, value] of Object.entries(values)) {
		if (Number.isInteger(value) && value >= low && value <= high) continue;
		throw new EngineInputError(input, value, `a whole number within ${low} to ${high}`);
	}
}
