import { CoveredSpans, SPAN_BREAK_S, type CoveredSpan } from './covered-spans';
import type { FindingList } from './findings';
import type { TraceGap } from './interval-tally';

/** So many rows wait for one that comes out of order. */
export const REACH_ROWS = 1024;
/** A row holds its time, its line and then its values. */
export const TIME_AT = 0;
export const LINE_AT = 1;
export const VALUES_FROM = 2;

export interface SorterOutput {
	/**
	 * Rows one after another in `rows`, `width` numbers each, in order of time; `beforeS` is the time of the row before the first
	 * in the same stretch, NaN where a stretch begins. Of what follows, `known` rows in all are there to look at, not to take.
	 */
	take(rows: Float64Array, count: number, beforeS: number, known: number): void;
	/** Two stretches have become one: what lay between them. */
	join(between: TraceGap): void;
}

/**
 * Puts rows in order of time with flat memory. A row that comes up to 1,024 rows late is put in its place. One that comes later
 * is kept where no rows before have covered its time, as when the days of a file stand in another order or the newest row stands
 * first, and dropped where they have. Of rows with the same time the first is kept.
 */
export class RowSorter {
	readonly spans = new CoveredSpans();
	/** Rows that came out of order and were kept. */
	moved = 0;
	private readonly rows: Float64Array;
	private count = 0;
	private span: CoveredSpan | null = null;
	private nextSpanStartS = Infinity;
	/** Nothing is put in before this time: up to it all has been given on, or the stretch begins with it. */
	private floorS = -Infinity;
	private lastS = -Infinity;
	private isNewSpan = true;
	private highestS = -Infinity;

	constructor(
		private readonly width: number,
		private readonly findings: FindingList,
		private readonly output: SorterOutput
	) {
		this.rows = new Float64Array(2 * REACH_ROWS * width);
	}

	add(row: Float64Array): void {
		const timeS = row[TIME_AT]!;
		if (!this.belongs(timeS) && !this.moveTo(timeS, row)) return;
		if (timeS > this.lastS) {
			this.append(row);
			this.lastS = timeS;
			this.span!.endS = timeS;
		} else if (!this.insert(row)) return;
		if (timeS < this.highestS) this.moved++;
		else this.highestS = timeS;
		if (this.count === 2 * REACH_ROWS) this.giveOn(REACH_ROWS);
	}

	/** Gives on all that waits. */
	flush(): void {
		if (this.count > 0) this.giveOn(this.count);
	}

	private belongs(timeS: number): boolean {
		if (timeS > this.lastS) return timeS - this.lastS <= SPAN_BREAK_S && timeS < this.nextSpanStartS;
		return timeS > this.floorS || (this.count > 0 && timeS === this.rows[TIME_AT]);
	}

	/** Goes on in another stretch; false where the time is covered, and the row dropped. */
	private moveTo(timeS: number, row: Float64Array): boolean {
		this.flush();
		if (this.spans.covers(timeS)) {
			this.findings.dropRow('alreadyCovered', row[LINE_AT]!, null, () => '');
			return false;
		}
		const between = this.span === null ? null : this.spans.joinWithNext(this.span);
		if (between !== null) this.output.join(between);
		const known = this.spans.list.length;
		this.span = this.spans.openAt(timeS, row[LINE_AT]!);
		this.isNewSpan = this.spans.list.length > known;
		this.nextSpanStartS = this.spans.nextStartS(this.span);
		this.floorS = this.span.endS;
		this.lastS = this.isNewSpan ? -Infinity : this.span.endS;
		return true;
	}

	private append(row: Float64Array): void {
		const from = this.count * this.width;
		for (let at = 0; at < this.width; at++) this.rows[from + at] = row[at]!;
		this.count++;
	}

	/** False where a row of this time is there already, and this one dropped. */
	private insert(row: Float64Array): boolean {
		const { rows, width } = this;
		const timeS = row[TIME_AT]!;
		let place = this.count;
		while (place > 0 && rows[(place - 1) * width]! > timeS) place--;
		if (place > 0 && rows[(place - 1) * width] === timeS) {
			const reason = this.isSame(row, (place - 1) * width) ? 'repeated' : 'repeatedDiffering';
			this.findings.dropRow(reason, row[LINE_AT]!, null, () => '');
			return false;
		}
		rows.copyWithin((place + 1) * width, place * width, this.count * width);
		rows.set(row, place * width);
		this.count++;
		return true;
	}

	private isSame(row: Float64Array, keptFrom: number): boolean {
		for (let at = VALUES_FROM; at < this.width; at++) {
			if (!Object.is(row[at], this.rows[keptFrom + at])) return false;
		}
		return true;
	}

	private giveOn(count: number): void {
		const { rows, width } = this;
		const beforeS = this.isNewSpan ? NaN : this.floorS;
		this.floorS = rows[(count - 1) * width]!;
		this.output.take(rows, count, beforeS, this.count);
		this.isNewSpan = false;
		rows.copyWithin(0, count * width, this.count * width);
		this.count -= count;
	}
}
