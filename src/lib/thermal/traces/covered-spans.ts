import type { TraceGap } from './interval-tally';

/** A stretch of time in which rows follow each other. */
export interface CoveredSpan {
	startS: number;
	endS: number;
	/** Of its first row. */
	startLine: number;
}

/** Rows further apart than this do not belong to one stretch, s: 60 days hold 86,400 stretches at most. */
export const SPAN_BREAK_S = 60;

/** The stretches of time that a trace has covered so far, in order, none touching another. */
export class CoveredSpans {
	readonly list: CoveredSpan[] = [];

	/** Whether a time lies in one of them. */
	covers(timeS: number): boolean {
		const before = this.list[this.countBefore(timeS) - 1];
		return before !== undefined && timeS <= before.endS;
	}

	/** The stretch that a time continues, or a new one that begins with it; the time must lie in none. */
	openAt(timeS: number, line: number): CoveredSpan {
		const count = this.countBefore(timeS);
		const before = this.list[count - 1];
		if (before && timeS - before.endS <= SPAN_BREAK_S) return before;
		const span = { startS: timeS, endS: timeS, startLine: line };
		this.list.splice(count, 0, span);
		return span;
	}

	/** Where the next stretch after this one begins. */
	nextStartS(span: CoveredSpan): number {
		return this.list[this.countBefore(span.startS)]?.startS ?? Infinity;
	}

	/** Makes one of a stretch that is left and the next, where they are near: what lay between; else null. */
	joinWithNext(span: CoveredSpan): TraceGap | null {
		const count = this.countBefore(span.startS);
		const next = this.list[count];
		if (!next || next.startS - span.endS > SPAN_BREAK_S) return null;
		const between = { fromS: span.endS, toS: next.startS, line: next.startLine };
		span.endS = next.endS;
		this.list.splice(count, 1);
		return between;
	}

	/** How many stretches begin at this time or before. */
	private countBefore(timeS: number): number {
		let low = 0;
		let high = this.list.length;
		while (low < high) {
			const middle = (low + high) >> 1;
			if (this.list[middle]!.startS <= timeS) low = middle + 1;
			else high = middle;
		}
		return low;
	}
}
