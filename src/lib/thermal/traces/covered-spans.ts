/** A stretch of time in which rows follow each other. */
export interface CoveredSpan {
	startS: number;
	endS: number;
}

/** Rows further apart than this do not belong to one stretch, s. */
export const SPAN_BREAK_S = 3600;

/** The stretches of time that a trace has covered so far, in order, none touching another. */
export class CoveredSpans {
	readonly list: CoveredSpan[] = [];

	/** The stretch that a time lies in; null where it lies in none. */
	spanAt(timeS: number): CoveredSpan | null {
		const before = this.list[this.countBefore(timeS) - 1];
		return before && timeS <= before.endS ? before : null;
	}

	/** The stretch that a time continues, or a new one that begins with it; the time must lie in none. */
	openAt(timeS: number): CoveredSpan {
		const count = this.countBefore(timeS);
		const before = this.list[count - 1];
		if (before && timeS - before.endS <= SPAN_BREAK_S) return before;
		const span = { startS: timeS, endS: timeS };
		this.list.splice(count, 0, span);
		return span;
	}

	/** Where the next stretch after this one begins. */
	nextStartS(span: CoveredSpan): number {
		return this.list[this.countBefore(span.startS)]?.startS ?? Infinity;
	}

	/** Where the stretch before this one ends. */
	endBeforeS(span: CoveredSpan): number {
		return this.list[this.countBefore(span.startS) - 2]?.endS ?? -Infinity;
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
