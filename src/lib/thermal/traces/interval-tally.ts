/** A stretch without rows that is much longer than the logger's own interval. */
export interface TraceGap {
	fromS: number;
	toS: number;
	/** Of the row behind it. */
	line: number;
}

/** So many of the longest gaps are told; all are counted. */
export const GAPS_TOLD = 100;

/** Lengths share a box when they differ by less than 1/64: sign, exponent and the first six bits behind the point. */
const BOX_SHIFT = 17;
const BOXES = 1 << (31 - BOX_SHIFT);

const asFloat = new Float32Array(1);
const asBits = new Uint32Array(asFloat.buffer);

function boxOf(lengthS: number): number {
	asFloat[0] = lengthS;
	return asBits[0]! >>> BOX_SHIFT;
}

/** Tallies the intervals between rows with flat memory: their median, and those that are gaps. */
export class IntervalTally {
	private readonly counts = new Float64Array(BOXES);
	private readonly sums = new Float64Array(BOXES);
	private readonly longest: TraceGap[] = [];
	/** Of those in `longest`, once it is full. */
	private shortestKeptS = 0;
	private total = 0;

	add(fromS: number, toS: number, line: number): void {
		const lengthS = toS - fromS;
		const box = boxOf(lengthS);
		this.counts[box]!++;
		this.sums[box]! += lengthS;
		this.total++;
		if (lengthS > this.shortestKeptS) this.keep({ fromS, toS, line });
	}

	/**
	 * The median of the intervals, s; NaN where there are none. Intervals within 1/64 of each other share a box, of which the mean
	 * is taken: exact where a logger keeps its interval.
	 */
	medianS(): number {
		let left = this.total / 2;
		for (let box = 0; box < BOXES; box++) {
			left -= this.counts[box]!;
			if (left <= 0 && this.counts[box]! > 0) return this.sums[box]! / this.counts[box]!;
		}
		return NaN;
	}

	/** Intervals longer than so many seconds: how many, and the longest of them in order of time. */
	gapsOver(limitS: number): { count: number; told: TraceGap[] } {
		const limitBox = boxOf(limitS);
		let count = 0;
		for (let box = limitBox + 1; box < BOXES; box++) count += this.counts[box]!;
		const told = this.longest.filter(({ fromS, toS }) => boxOf(toS - fromS) > limitBox);
		return { count, told: told.sort((a, b) => a.fromS - b.fromS) };
	}

	private keep(gap: TraceGap): void {
		const { longest } = this;
		const lengthS = gap.toS - gap.fromS;
		let place = longest.length;
		while (place > 0 && longest[place - 1]!.toS - longest[place - 1]!.fromS < lengthS) place--;
		longest.splice(place, 0, gap);
		if (longest.length > GAPS_TOLD) longest.pop();
		const last = longest.at(-1)!;
		if (longest.length === GAPS_TOLD) this.shortestKeptS = last.toS - last.fromS;
	}
}
