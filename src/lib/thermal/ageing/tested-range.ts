import { EngineInputError } from '../correlations/require';

/** What the tests behind a model covered; temperatures in °C, state of charge and depth of discharge 0…1. */
export interface TestedRange {
	tempC: readonly [number, number];
	soc?: readonly [number, number];
	depthOfDischarge?: readonly [number, number];
	cRate?: readonly [number, number];
	/** How long the tests ran. */
	years?: number;
}

/** Refuses what the tests of a model did not cover. */
export function requireTested(
	range: TestedRange,
	values: Readonly<Partial<Record<'tempC' | 'soc' | 'depthOfDischarge' | 'cRate', number>>>
): void {
	for (const [input, value] of Object.entries(values)) {
		const [low, high] = range[input as keyof typeof values] ?? [-Infinity, Infinity];
		if (!(value >= low && value <= high)) {
			throw new EngineInputError(input, value, `within ${low} to ${high}, where the model was tested`);
		}
	}
}
