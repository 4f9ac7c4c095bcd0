import { CHANNEL_NODES, FIT_CHANNELS, isMeasured, type FitChannel } from './trace';
import type { TraceOfScenario } from './trace-model';

const S_PER_MIN = 60;

/** The readings of one channel of one trace that are held against the model. */
export interface Block {
	trace: number;
	channel: FitChannel;
	/** Place of the channel among the rows that the model foretells. */
	row: number;
	measured: Float64Array;
	/** Places of the readings that count. */
	at: Int32Array;
}

/** A channel that is measured and yet held against nothing. */
export interface UnusedChannel {
	trace: number;
	channel: FitChannel;
	why: string;
}

/** Which of the times of a trace lie in some of its legs. */
export function markLegs({ trace, scenario }: TraceOfScenario, legs: readonly number[]): Uint8Array {
	const marked = new Uint8Array(trace.timeS.length);
	let fromS = 0;
	scenario.legs.forEach(({ minutes }, leg) => {
		const toS = fromS + S_PER_MIN * minutes;
		if (legs.includes(leg)) {
			trace.timeS.forEach((time, at) => {
				if (time >= fromS && time < toS) marked[at] = 1;
			});
		}
		fromS = toS;
	});
	return marked;
}

/**
 * The readings of one trace by channel.
 *
 * @param counts 1 for each time whose readings are wanted
 */
export function listBlocks(of: TraceOfScenario, trace: number, counts: Uint8Array): Block[] {
	const foretold = FIT_CHANNELS.filter(
		(channel) => channel !== 'exhaustShieldC' || of.scenario.shield !== null
	);
	return foretold.flatMap((channel, row) => {
		const measured = of.trace.channels[channel];
		if (!isMeasured(measured)) return [];
		const at = Int32Array.from(
			[...measured.keys()].filter((place) => counts[place] === 1 && !Number.isNaN(measured[place]!))
		);
		return at.length === 0 ? [] : [{ trace, channel, row, measured, at }];
	});
}

export function listUnused(traces: readonly TraceOfScenario[]): UnusedChannel[] {
	return traces.flatMap(({ trace, scenario }, at) =>
		FIT_CHANNELS.filter((channel) => isMeasured(trace.channels[channel]))
			.filter((channel) => CHANNEL_NODES[channel] === 'shield' && scenario.shield === null)
			.map((channel) => ({ trace: at, channel, why: 'The scenario of this trace has no heat shield.' }))
	);
}
