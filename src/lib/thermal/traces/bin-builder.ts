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

function finishBins({ count, sum, min, max }: Sums, used: number): ChannelBins {
	const bins = emptyBins(used);
	for (let bin = 0; bin < used; bin++) {
		const values = count[bin]!;
		if (values === 0) continue;
		bins.count[bin] = values;
		bins.mean[bin] = Math.min(Math.max(sum[bin]! / values, min[bin]!), max[bin]!);
		bins.min[bin] = min[bin]!;
		bins.max[bin] = max[bin]!;
	}
	return bins;
}

/** Sums rows into bins while they are read: begins with the shortest bins and joins them whenever they become too many. */
export class BinBuilder {
	private stepAt = 0;
	private perSecond = 1 / BIN_STEPS_S[0];
	private originS = NaN;
	private used = 0;
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
		const bins = this.channels.map((channel, at) => [channel, finishBins(this.sums[at]!, this.used)]);
		const stepS = BIN_STEPS_S[this.stepAt]!;
		return { startS: this.originS, stepS, binCount: this.used, channels: Object.fromEntries(bins) };
	}

	private put(sums: Sums, bin: number, value: number): void {
		sums.count[bin]!++;
		sums.sum[bin]! += value;
		if (value < sums.min[bin]!) sums.min[bin] = value;
		if (value > sums.max[bin]!) sums.max[bin] = value;
	}

	private findBin(timeS: number): number {
		if (!(timeS >= this.originS)) this.beginAt(Math.floor((timeS + HAIR_S) / MINUTE_S) * MINUTE_S);
		let bin = Math.floor((timeS - this.originS + HAIR_S) * this.perSecond);
		while (bin >= MOST_BINS) {
			this.coarsen();
			bin = Math.floor((timeS - this.originS + HAIR_S) * this.perSecond);
		}
		if (bin >= this.capacity) this.grow(bin + 1);
		if (bin >= this.used) this.used = bin + 1;
		return bin;
	}

	private beginAt(originS: number): void {
		const earlierS = this.originS - originS;
		this.originS = originS;
		if (!(earlierS > 0)) return;
		while (this.used + Math.round(earlierS * this.perSecond) > MOST_BINS) this.coarsen();
		const shift = Math.round(earlierS * this.perSecond);
		this.rebuildAll(this.used + shift, shift, 1);
	}

	private grow(needed: number): void {
		this.rebuildAll(needed, 0, 1);
	}

	private coarsen(): void {
		const factor = Math.round(BIN_STEPS_S[this.stepAt + 1]! / BIN_STEPS_S[this.stepAt]!);
		this.stepAt++;
		this.perSecond = 1 / BIN_STEPS_S[this.stepAt]!;
		this.rebuildAll(Math.ceil(this.used / factor), 0, factor);
	}

	private rebuildAll(needed: number, shift: number, factor: number): void {
		while (this.capacity < needed) this.capacity = Math.min(2 * this.capacity, MOST_BINS);
		this.sums = this.sums.map((old) => rebuild(old, this.used, this.capacity, shift, factor));
		this.used = Math.ceil((this.used + shift) / factor);
	}
}
