import { CHANNEL_LAWS, type ChannelLaw } from './channels';
import type { FindingList } from './findings';
import type { ColumnMapping } from './mapping';
import { LINE_AT, TIME_AT, VALUES_FROM } from './row-sorter';

/**
 * Takes out single values that are far from both neighbours, on the same side, while those agree with each other. A value that
 * stays for two rows is left: that may be true.
 */
export class SpikeFilter {
	private readonly laws: ChannelLaw[];
	private readonly width: number;
	private readonly before: Float64Array;

	constructor(
		private readonly columns: readonly ColumnMapping[],
		private readonly findings: FindingList
	) {
		this.laws = columns.map(({ channel }) => CHANNEL_LAWS[channel]);
		this.width = VALUES_FROM + columns.length;
		this.before = new Float64Array(this.width).fill(NaN);
	}

	/** Looks at the first `count` of `known` rows and makes spikes NaN, in place. */
	filter(rows: Float64Array, count: number, known: number): void {
		const { width, before } = this;
		for (let channel = 0; channel < this.laws.length; channel++) {
			if (Number.isFinite(this.laws[channel]!.spikeOver)) this.filterChannel(channel, rows, count, known);
		}
		for (let at = 0; at < width; at++) before[at] = rows[(count - 1) * width + at]!;
	}

	private filterChannel(channel: number, rows: Float64Array, count: number, known: number): void {
		const { width, before } = this;
		const at = VALUES_FROM + channel;
		const { spikeOver, spikeWithinS } = this.laws[channel]!;
		let [lastS, last] = [before[TIME_AT]!, before[at]!];
		for (let row = 0; row < count && row + 1 < known; row++) {
			const from = row * width;
			const timeS = rows[from + TIME_AT]!;
			const value = rows[from + at]!;
			const step = value - last;
			if (step > spikeOver || step < -spikeOver) {
				const nextS = rows[from + width + TIME_AT]!;
				const near = timeS - lastS <= spikeWithinS && timeS > lastS && nextS - timeS <= spikeWithinS;
				if (near && isSpike(step, rows[from + width + at]! - value, spikeOver)) {
					this.passOver(channel, rows, from);
				}
			}
			lastS = timeS;
			last = rows[from + at]!;
		}
	}

	private passOver(channel: number, rows: Float64Array, from: number): void {
		const value = rows[from + VALUES_FROM + channel]!;
		rows[from + VALUES_FROM + channel] = NaN;
		this.findings.cells[channel]!.values--;
		const { column } = this.columns[channel]!;
		this.findings.dropCell(channel, 'spike', rows[from + LINE_AT]!, column, () => String(value));
	}
}

/** Up and down again, or down and up, by more than the limit each, to within half the limit of where it was. */
const isSpike = (there: number, back: number, limit: number): boolean =>
	there * back < 0 && Math.abs(back) > limit && Math.abs(there + back) <= limit / 2;
