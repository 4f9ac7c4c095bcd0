import { EngineInputError } from '../correlations/require';
import { requireWhole } from '../statistics/require-whole';
import { channelsOf, joinBins, type BinnedTrace, type ChannelBins } from './binned-trace';
import type { TraceChannel } from './channels';

/** What is drawn of one channel: a line for the mean in a band from lowest to highest; NaN where nothing was measured. */
export interface TraceCurve {
	/** Middle of each point, s. */
	timeS: Float64Array;
	mean: Float32Array;
	min: Float32Array;
	max: Float32Array;
	/** Length of time that each point stands for, s. */
	stepS: number;
}

interface Level {
	stepS: number;
	channels: Map<TraceChannel, ChannelBins>;
}

const JOINED = 2;
const MOST_POINTS = 100_000;

/**
 * A trace prepared for being looked at from near and far: its bins, and again in pairs, and again, until one is left.
 *
 * Validity: any trace; takes twice the memory of its bins.
 * Source: a pyramid of resolutions, as pictures have it (Williams, Pyramidal parametrics, SIGGRAPH 1983).
 * @example
 * const bins = { count: [1, 1, 1, 1], mean: [1, 2, 3, 4], min: [1, 2, 3, 4], max: [1, 2, 3, 4] };
 * const trace = { timeBase: 'elapsed', timeZone: null, startS: 0, stepS: 60, binCount: 4, channels: { cellC: bins } };
 * const { max } = new TraceView(trace).curve('cellC', 0, 240, 2);
 * [max[0], max[1]]; // [2, 4]
 */
export class TraceView {
	private readonly levels: Level[];

	constructor(private readonly trace: BinnedTrace) {
		const first = new Map(channelsOf(trace).map((channel) => [channel, trace.channels[channel]!]));
		this.levels = [{ stepS: trace.stepS, channels: first }];
		for (let count = trace.binCount; count > 1; count = Math.ceil(count / JOINED)) {
			const { stepS, channels } = this.levels.at(-1)!;
			const joined = new Map([...channels].map(([channel, bins]) => [channel, joinBins(bins, JOINED)]));
			this.levels.push({ stepS: stepS * JOINED, channels: joined });
		}
	}

	/**
	 * One channel between two times with at most so many points: the finest bins of which few enough are needed. Every value that
	 * was measured in that time lies within the band.
	 *
	 * @param channel one that the trace has
	 * @param fromS begin of what is looked at, s, as the trace counts
	 * @param toS its end, s
	 * @param mostPoints 1 to 100,000
	 * @returns a point for each bin that touches the time, in order; none where the trace is elsewhere
	 * @throws EngineInputError for a time that ends before it begins, no whole number of points, or a channel that is not there
	 */
	curve(channel: TraceChannel, fromS: number, toS: number, mostPoints: number): TraceCurve {
		if (!(fromS < toS)) throw new EngineInputError('toS', toS, `above fromS, ${fromS} s`);
		requireWhole(1, MOST_POINTS, { mostPoints });
		const { startS } = this.trace;
		for (const { stepS, channels } of this.levels) {
			const bins = channels.get(channel);
			if (!bins) throw new EngineInputError(channel, NaN, 'a channel of the trace');
			const first = Math.max(Math.floor((fromS - startS) / stepS), 0);
			const end = Math.min(Math.ceil((toS - startS) / stepS), bins.count.length);
			if (end - first <= mostPoints) return cut(bins, first, Math.max(end, first), startS, stepS);
		}
		throw new EngineInputError('mostPoints', mostPoints, 'at least 1');
	}
}

function cut(bins: ChannelBins, first: number, end: number, startS: number, stepS: number): TraceCurve {
	const timeS = Float64Array.from({ length: end - first }, (_, at) => startS + (first + at + 0.5) * stepS);
	const part = (values: Float32Array) => values.slice(first, end);
	return { timeS, mean: part(bins.mean), min: part(bins.min), max: part(bins.max), stepS };
}
