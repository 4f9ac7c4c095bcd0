import {
	BIN_STEPS_S,
	emptyBins,
	MINUTE_S,
	MOST_BINS,
	type BinnedTrace,
	type ChannelBins
} from './binned-trace';
import type { TraceChannel } from './channels';
import { TIME_AT, VALUES_FROM } from './row-sorter';

const FIRST_CAPACITY = 4096;
/** A time that is a hair before its bin through rounding belongs into it, s. */
const HAIR_S = 1e-6;

/** Bins of one channel in the making. */
interface Sums {
	count: Uint32Array;
	sum: Float64Array;
	min: Float64Array;
	max: Float64Array;
}

function makeSums(capacity: number): Sums {
	return {
		count: new Uint32Array(capacity),
		sum: new Float64Array(capacity),
		min: new Float64Array(capacity).fill(Infinity),
		max: new Float64Array(capacity).fill(-Infinity)
	};
}

/** The same in arrays of another length, moved along by `shift` bins and joined `factor` each. */
function rebuild(old: Sums, used: number, capacity: number, shift: number, factor: number): Sums {
	const sums = makeSums(capacity);
	for (let from = 0; from < used; from++) {
		if (old.count[from] === 0) continue;
		const bin = Math.floor((from + shift) / factor);
		sums.count[bin]! += old.count[from]!;
		sums.sum[bin]! += old.sum[from]!;
		sums.min[bin] = Math.min(sums.min[bin]!, old.min[from]!);
		sums.max[bin] = Math.max(sums.max[bin]!, old.max[from]!);
	}
	return sums;
}

function finishBins({ count, sum, min, max }: Sums, from: number, end: number): ChannelBins {
	const bins = emptyBins(end - from);
	for (let at = from; at < end; at++) {
		const values = count[at]!;
		if (values === 0) continue;
		const bin = at - from;
		bins.count[bin] = values;
		bins.mean[bin] = Math.min(Math.max(sum[at]! / values, min[at]!), max[at]!);
		bins.min[bin] = min[at]!;
		bins.max[bin] = max[at]!;
	}
	return bins;
}

/**
 * Sums rows into bins while they are read: begins with the shortest bins and joins them whenever they become too many. Bins may
 * be added at both ends; those in front of the first used one are room for more.
 */
export class BinBuilder {
	private stepAt = 0;
	private perSecond = 1 / BIN_STEPS_S[0];
	/** Where bin 0 begins: always on a whole minute. */
	private originS = NaN;
	private first = Infinity;
	private end = 0;
	private capacity = FIRST_CAPACITY;
	private sums: Sums[];

	constructor(private readonly channels: readonly TraceChannel[]) {
		this.sums = channels.map(() => makeSums(FIRST_CAPACITY));
	}

	/** Rows as the sorter gives them on. */
	add(rows: Float64Array, count: number): void {
		const width = VALUES_FROM + this.channels.length;
		for (let from = 0; from < count * width; from += width) {
			const bin = this.findBin(rows[from + TIME_AT]!);
			for (let channel = 0; channel < this.channels.length; channel++) {
				const value = rows[from + VALUES_FROM + channel]!;
				if (value === value) this.put(this.sums[channel]!, bin, value);
			}
		}
	}

	/** The bins, not shorter than the interval that the logger kept to, s. */
	finish(medianIntervalS: number): Pick<BinnedTrace, 'startS' | 'stepS' | 'binCount' | 'channels'> {
		while (this.stepAt < BIN_STEPS_S.length - 1 && BIN_STEPS_S[this.stepAt]! < medianIntervalS - HAIR_S) {
			this.coarsen();
		}
		const stepS = BIN_STEPS_S[this.stepAt]!;
		const from = this.toMinute(this.first);
		const bins = this.channels.map((channel, at) => [channel, finishBins(this.sums[at]!, from, this.end)]);
		const startS = this.originS + Math.round(from * stepS);
		return { startS, stepS, binCount: this.end - from, channels: Object.fromEntries(bins) };
	}

	private put(sums: Sums, bin: number, value: number): void {
		sums.count[bin]!++;
		sums.sum[bin]! += value;
		if (value < sums.min[bin]!) sums.min[bin] = value;
		if (value > sums.max[bin]!) sums.max[bin] = value;
	}

	private findBin(timeS: number): number {
		if (!(timeS >= this.originS)) this.makeRoomBefore(Math.floor((timeS + HAIR_S) / MINUTE_S) * MINUTE_S);
		const bin = Math.floor((timeS - this.originS + HAIR_S) * this.perSecond);
		const [first, end] = [Math.min(this.first, bin), Math.max(this.end, bin + 1)];
		if (end - this.toMinute(first) > MOST_BINS) {
			this.coarsen();
			return this.findBin(timeS);
		}
		if (end > this.capacity) this.rebuildAll(end, 0, 1);
		this.first = first;
		this.end = end;
		return bin;
	}

	/** Lets bin 0 begin at this minute or before: with as much room again, so that a file with its newest row first is quick too. */
	private makeRoomBefore(minuteS: number): void {
		const earlierS = this.originS - minuteS;
		if (!(earlierS > 0)) {
			this.originS = minuteS;
			return;
		}
		while (this.end + Math.round(earlierS * this.perSecond) > MOST_BINS) this.coarsen();
		const needed = Math.round(earlierS * this.perSecond);
		const shift = needed + this.toMinute(Math.min(this.end, MOST_BINS - this.end - needed));
		this.originS -= Math.round(shift / this.perSecond);
		this.rebuildAll(this.end + shift, shift, 1);
	}

	/** The bin that begins with the minute in which this one lies. */
	private toMinute(bin: number): number {
		const each = Math.round(MINUTE_S * this.perSecond);
		return Math.floor(bin / each) * each;
	}

	private coarsen(): void {
		const factor = Math.round(BIN_STEPS_S[this.stepAt + 1]! / BIN_STEPS_S[this.stepAt]!);
		this.stepAt++;
		this.perSecond = 1 / BIN_STEPS_S[this.stepAt]!;
		this.rebuildAll(Math.ceil(this.end / factor), 0, factor);
	}

	private rebuildAll(needed: number, shift: number, factor: number): void {
		while (this.capacity < needed) this.capacity *= 2;
		this.sums = this.sums.map((old) => rebuild(old, this.end, this.capacity, shift, factor));
		this.first = Math.floor((this.first + shift) / factor);
		this.end = Math.ceil((this.end + shift) / factor);
	}
}
