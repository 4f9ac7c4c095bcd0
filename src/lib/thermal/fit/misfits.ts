import type { Block } from './blocks';
import { middleOf } from './condense-course';
import type { FitChannel } from './trace';

/** A channel of a trace that the model does not follow, by far. */
export interface Misfit {
	trace: number;
	channel: FitChannel;
	/** How far off the model is after the fit, K. */
	residualK: number;
	/** Root mean square. Not there in older fits, which told of the middle of the readings. */
	measure?: 'rms';
	/** How far readings stray by themselves, K. */
	noiseK: number;
}

/** Median of |x| of a normal x in standard deviations, turned round. */
const SD_PER_MEDIAN = 1.4826;
/** Variance of the second difference of independent readings, in theirs. */
const SECOND_DIFFERENCE = 6;
/** What a logger's thermometer is right to: below it no misfit is told from a sensor that is off, K; engineering judgement. */
const LEAST_NOISE_K = 0.5;
/** From so many times the noise on the model is said not to follow; engineering judgement. */
const MANY_TIMES = 4;

const spreadOf = (values: readonly number[]): number => SD_PER_MEDIAN * middleOf(values.map(Math.abs));

/** What readings stray by from their own course: a smooth one has hardly a second difference. */
function findNoise({ measured }: Block): number {
	const bends = [...measured.subarray(2)].map((value, at) => value - 2 * measured[at + 1]! + measured[at]!);
	const known = bends.filter((value) => !Number.isNaN(value));
	const ownK = known.length === 0 ? 0 : spreadOf(known) / Math.sqrt(SECOND_DIFFERENCE);
	return Math.max(ownK, LEAST_NOISE_K);
}

/** A model that is off throughout every drive is off, though the battery stood most of the day: the middle would hide it. */
function rootMeanSquare(values: readonly number[]): number {
	return values.length === 0 ? 0 : Math.hypot(...values) / Math.sqrt(values.length);
}

/**
 * The blocks whose residuals are many times what their readings stray by.
 *
 *     σ_e = √mean(e²),   σ_m = max(1.4826 median|Δ²T|/√6, 0.5),   told from σ_e ≥ 4 σ_m on
 *
 * @param residuals after the fit, block by block
 */
export function findMisfits(blocks: readonly Block[], residuals: readonly Float64Array[]): Misfit[] {
	return blocks.flatMap((block, at) => {
		const residualK = rootMeanSquare([...residuals[at]!].filter((value) => !Number.isNaN(value)));
		const noiseK = findNoise(block);
		const { trace, channel } = block;
		return residualK >= MANY_TIMES * noiseK
			? [{ trace, channel, residualK, measure: 'rms' as const, noiseK }]
			: [];
	});
}
