import { sampleQuantile } from '../statistics';
import { coarsenTrace, minuteBins, type BinnedTrace } from './binned-trace';
import { CHANNEL_LAWS, type TraceChannel } from './channels';
import type { ChangeSignal } from './change-points';

/** What a channel says of driving, and how it changes where the driving does. */
interface EvidenceLaw {
	channel: TraceChannel;
	shape: ChangeSignal['shape'];
	/** Less than this from minute to minute is no change, in the channel's unit; engineering judgement. */
	leastNoise: number;
}

/** Channels that tell of driving, the surest first. Temperatures follow the driving with a delay: their slope breaks, not their level. */
const EVIDENCE: readonly EvidenceLaw[] = [
	{ channel: 'speedKmh', shape: 'level', leastNoise: 4 },
	{ channel: 'currentA', shape: 'level', leastNoise: 1 },
	{ channel: 'exhaustShieldC', shape: 'line', leastNoise: 1 },
	{ channel: 'bayAirC', shape: 'line', leastNoise: 0.5 }
];

/** Through so many points at most the changes are looked for: longer traces on a coarser grid of whole minutes. */
const MOST_POINTS = 5000;
/** A channel that was silent for longer than this share of the time says nothing. */
const LEAST_TOLD = 0.5;
/** Standard deviation of normal values from their median absolute deviation. */
const SD_PER_MAD = 1.4826;

/** One channel on the grid, its silences bridged. */
export interface Evidence {
	channel: TraceChannel;
	values: Float64Array;
	/** The values count from the outside air. */
	isExcess: boolean;
	signal: ChangeSignal;
}

/** The trace on whole minutes, few enough. */
export function onGrid(trace: BinnedTrace): BinnedTrace {
	const minutes = minuteBins(trace);
	const each = Math.ceil(minutes.binCount / MOST_POINTS);
	return each === 1 ? minutes : coarsenTrace(minutes, each * minutes.stepS);
}

/** Straight lines over what is missing, level at both ends. */
function bridge(means: ArrayLike<number>): Float64Array {
	const values = Float64Array.from(means);
	let last = -1;
	for (let at = 0; at <= values.length; at++) {
		if (at < values.length && Number.isNaN(values[at])) continue;
		const before = last < 0 ? values[at] : values[last];
		const after = at < values.length ? values[at] : before;
		for (let hole = last + 1; hole < at; hole++) {
			values[hole] = before! + ((after! - before!) * (hole - last)) / (at - last);
		}
		last = at;
	}
	return values;
}

/** Noise from minute to minute: changes are few, so that the median does not see them. */
function findNoise(values: Float64Array, least: number): number {
	const steps = Array.from(values.subarray(1), (value, at) => Math.abs(value - values[at]!));
	const median = steps.length === 0 ? 0 : sampleQuantile(steps, 0.5);
	return Math.max((SD_PER_MAD * median) / Math.SQRT2, least);
}

/** What a channel measured, its silences bridged; null where it was silent for too long. */
function readChannel({ channels, binCount }: BinnedTrace, channel: TraceChannel): Float64Array | null {
	const bins = channels[channel];
	if (!bins) return null;
	const told = bins.count.filter((count) => count > 0).length;
	return told < LEAST_TOLD * binCount || told === 0 ? null : bridge(bins.mean);
}

/** Temperatures count from the outside air where that was measured: what warms with the day was not driven. */
function toEvidence(grid: BinnedTrace, { channel, shape, leastNoise }: EvidenceLaw): Evidence[] {
	const measured = readChannel(grid, channel);
	if (!measured) return [];
	const airC = CHANNEL_LAWS[channel].quantity === 'temperature' ? readChannel(grid, 'ambientC') : null;
	const values = airC ? measured.map((value, at) => value - airC[at]!) : measured;
	const noise = findNoise(values, leastNoise);
	return [{ channel, values, isExcess: airC !== null, signal: { values, shape, noise } }];
}

/** What the trace has to tell of driving: the speed alone where there is one, else everything that there is. */
export function gatherEvidence(grid: BinnedTrace): Evidence[] {
	const all = EVIDENCE.flatMap((law) => toEvidence(grid, law));
	const speed = all.filter(({ channel }) => channel === 'speedKmh');
	return speed.length > 0 ? speed : all;
}
