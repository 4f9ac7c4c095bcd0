import type { Block } from './blocks';
import type { FitChannel } from './trace';

/** How far the model is from readings. */
export interface FitError {
	readings: number;
	rmsK: number;
	/** Mean of model less reading, K. */
	biasK: number;
	/** Nineteen of twenty readings are no further off, K. */
	p95K: number;
}

export interface FitErrors {
	all: FitError;
	byChannel: Partial<Record<FitChannel, FitError>>;
}

const known = (series: readonly Float64Array[]): number[] =>
	series.flatMap((values) => [...values].filter((value) => !Number.isNaN(value)));

function measureError(series: readonly Float64Array[]): FitError {
	const values = known(series);
	const readings = values.length;
	const mean = (of: (value: number) => number) =>
		values.reduce((sum, value) => sum + of(value), 0) / readings;
	const sizes = values.map(Math.abs).sort((a, b) => a - b);
	return {
		readings,
		rmsK: Math.sqrt(mean((value) => value * value)),
		biasK: mean((value) => value),
		p95K: sizes[Math.min(readings - 1, Math.ceil(0.95 * readings) - 1)] ?? NaN
	};
}

/** Errors over all readings and channel by channel; null where there is not one reading. */
export function measureErrors(
	blocks: readonly Block[],
	residuals: readonly Float64Array[]
): FitErrors | null {
	if (blocks.length === 0) return null;
	const channels = [...new Set(blocks.map(({ channel }) => channel))];
	return {
		all: measureError(residuals),
		byChannel: Object.fromEntries(
			channels.map((channel) => [
				channel,
				measureError(residuals.filter((_, at) => blocks[at]!.channel === channel))
			])
		)
	};
}
