import { countPerIndependent } from './autocorrelation';
import { middleOf } from './condense-course';
import type { Block } from './blocks';
import type { Loss } from './robust-loss';
import { FIT_CHANNELS, type FitChannel } from './trace';

/** Median of |x| of a normal x in standard deviations, turned round (Huber, Robust Statistics, 1981, section 5.1). */
const SD_PER_MEDIAN = 1.4826;

/** How a channel's readings stray from the model, and what they are therefore worth. */
export interface ChannelNoise {
	/** K. */
	sdK: number;
	readings: number;
	/** So many readings in a row say as much as one independent one. */
	perIndependent: number;
	/** What one reading counts in the sum of squares of its roots: 1 for independent readings and squares. */
	weight: number;
	/** What a reading tells: Fisher information of a temperature, 1/K². */
	informationPerK2: number;
}
export type Noises = Partial<Record<FitChannel, ChannelNoise>>;

/** Model less reading, K, at the places of a block; NaN elsewhere. */
export function residualsOf({ measured, row, at }: Block, rows: readonly Float64Array[]): Float64Array {
	const residuals = new Float64Array(measured.length).fill(NaN);
	for (const place of at) residuals[place] = rows[row]![place]! - measured[place]!;
	return residuals;
}

function judgeChannel(series: readonly Float64Array[], loss: Loss, leastSdK: number): ChannelNoise {
	const known = series.flatMap((values) => [...values].filter((value) => !Number.isNaN(value)));
	const sdK = Math.max(SD_PER_MEDIAN * middleOf(known.map(Math.abs)), leastSdK);
	const pulls = series.map((values) => values.map((value) => loss.pull(value / sdK)));
	const meanOf = (read: (u: number) => number) =>
		known.reduce((sum, value) => sum + read(value / sdK), 0) / known.length;
	const slope = meanOf(loss.pullSlope);
	const square = Math.max(
		meanOf((u) => loss.pull(u) ** 2),
		1e-12
	);
	const perIndependent = countPerIndependent(pulls);
	return {
		sdK,
		readings: known.length,
		perIndependent,
		weight: slope / square / perIndependent,
		informationPerK2: slope ** 2 / square / perIndependent / sdK ** 2
	};
}

/**
 * Reads from the residuals of a fit what each channel's readings are worth.
 *
 *     σ = 1.4826 median|e|,   information a reading = (mean ψ′)²/(mean ψ²) /(σ² τ)
 *
 * τ readings in a row count as one: model and sensors are off by much the same from one minute to the next.
 * Source: Huber, Robust Statistics (1981), section 7.6; effective sample size as in von Storch and Zwiers, Statistical Analysis in
 * Climate Research (1999), section 6.6, from memory.
 *
 * @param residuals of each block, as residualsOf gives them
 * @param leastSdK what no channel is believed to be better than, K
 */
export function judgeNoise(
	blocks: readonly Block[],
	residuals: readonly Float64Array[],
	loss: Loss,
	leastSdK: number
): Noises {
	const noises: Noises = {};
	for (const channel of FIT_CHANNELS) {
		const series = residuals.filter((_, at) => blocks[at]!.channel === channel);
		if (series.length > 0) noises[channel] = judgeChannel(series, loss, leastSdK);
	}
	return noises;
}

/** What is taken before any fit: readings independent of each other, so that the data are heard before they are judged. */
export function firstNoise(blocks: readonly Block[], sdK: number): Noises {
	const noise = { sdK, readings: 0, perIndependent: 1, weight: 1, informationPerK2: 1 / sdK ** 2 };
	return Object.fromEntries(blocks.map(({ channel }) => [channel, noise]));
}
