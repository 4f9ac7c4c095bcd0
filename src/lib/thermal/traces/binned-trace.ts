import { EngineInputError } from '../correlations/require';
import { inChannelOrder } from './findings';
import type { TraceChannel } from './channels';
import type { TimeBase } from './time-reader';

/** What each channel did in each bin; arrays of one length, 32 bits a number. */
export interface ChannelBins {
	/** Values in the bin; where there are none the others are NaN. */
	count: Uint32Array;
	mean: Float32Array;
	min: Float32Array;
	max: Float32Array;
}

/** A trace as it is kept: bins of one length, one after another, beginning on a whole minute. */
export interface BinnedTrace {
	timeBase: TimeBase;
	/** IANA name; null where the file needed none. */
	timeZone: string | null;
	/** Where the first bin begins, s after the base: 1970 UTC, midnight of the first day, or the logger's own start. */
	startS: number;
	stepS: number;
	binCount: number;
	channels: Partial<Record<TraceChannel, ChannelBins>>;
}

/**
 * Lengths that a bin can have, s: each a whole number of the one before, so that fine bins join into coarse ones, and the last
 * makes 60 days of 86,400 bins.
 */
export const BIN_STEPS_S = [0.1, 0.5, 1, 5, 15, 60] as const;
export const MOST_BINS = 100_000;
export const MINUTE_S = 60;

export const channelsOf = (trace: BinnedTrace): TraceChannel[] =>
	inChannelOrder(Object.keys(trace.channels) as TraceChannel[]);

/** Where a trace ends, s. */
export const endOf = ({ startS, stepS, binCount }: BinnedTrace): number => startS + stepS * binCount;

export function emptyBins(count: number): ChannelBins {
	const column = () => new Float32Array(count).fill(NaN);
	return { count: new Uint32Array(count), mean: column(), min: column(), max: column() };
}

/** Joins so many bins each into one. */
export function joinBins(bins: ChannelBins, factor: number): ChannelBins {
	const joined = emptyBins(Math.ceil(bins.count.length / factor));
	for (let bin = 0; bin < joined.count.length; bin++) {
		let [count, sum, min, max] = [0, 0, Infinity, -Infinity];
		const to = Math.min((bin + 1) * factor, bins.count.length);
		for (let from = bin * factor; from < to; from++) {
			const values = bins.count[from]!;
			if (values === 0) continue;
			count += values;
			sum += values * bins.mean[from]!;
			min = Math.min(min, bins.min[from]!);
			max = Math.max(max, bins.max[from]!);
		}
		if (count === 0) continue;
		joined.count[bin] = count;
		joined.min[bin] = min;
		joined.max[bin] = max;
		// Rounding must not lift the mean over the highest value.
		joined.mean[bin] = Math.min(Math.max(sum / count, min), max);
	}
	return joined;
}

/**
 * The same trace in longer bins.
 *
 *     n = Σ nᵢ,  mean = Σ nᵢ meanᵢ / n,  min = min(minᵢ),  max = max(maxᵢ)
 *
 * @param trace a trace as it is kept
 * @param stepS length of the new bins, s: a whole number of the trace's own
 * @returns a new trace; counts, lowest and highest values are exact, means within the rounding of 32 bits
 * @throws EngineInputError where the new length is not a whole number of the old
 * Validity: any trace.
 * Source: mean of pooled samples.
 * @example
 * const bins = { count: [1, 3], mean: [10, 30], min: [10, 20], max: [10, 40] };
 * const base = { timeBase: 'elapsed', timeZone: null, startS: 0 };
 * coarsenTrace({ ...base, stepS: 15, binCount: 2, channels: { cellC: bins } }, 60).channels.cellC.mean[0]; // 25
 */
export function coarsenTrace(trace: BinnedTrace, stepS: number): BinnedTrace {
	const factor = Math.round(stepS / trace.stepS);
	if (!(factor >= 1) || Math.abs(factor * trace.stepS - stepS) > 1e-9 * stepS) {
		throw new EngineInputError('stepS', stepS, `a whole number of bins of ${trace.stepS} s`);
	}
	if (factor === 1) return trace;
	const channels = Object.fromEntries(
		channelsOf(trace).map((channel) => [channel, joinBins(trace.channels[channel]!, factor)])
	);
	return { ...trace, stepS, binCount: Math.ceil(trace.binCount / factor), channels };
}

/**
 * The same trace in bins of one minute, as the engine's own runs have them: for fitting and for finding the legs.
 *
 * @param trace a trace as it is kept, its bins at most one minute long
 * @returns a trace with stepS 60
 * @throws EngineInputError where the bins are longer than a minute
 * Validity: any trace that was read here.
 * Source: as coarsenTrace.
 * @example
 * const bins = { count: [1, 1], mean: [10, 30], min: [10, 30], max: [10, 30] };
 * const base = { timeBase: 'elapsed', timeZone: null, startS: 0 };
 * minuteBins({ ...base, stepS: 15, binCount: 2, channels: { cellC: bins } }).binCount; // 1
 */
export const minuteBins = (trace: BinnedTrace): BinnedTrace => coarsenTrace(trace, MINUTE_S);
