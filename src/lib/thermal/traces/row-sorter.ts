import { CoveredSpans, SPAN_BREAK_S, type CoveredSpan } from './covered-spans';
import type { FindingList } from './findings';
import { TraceError } from './trace-error';

/** So many rows wait for one that comes out of order. */
export const REACH_ROWS = 1024;
const MOST_SPANS = 5000;
/** A row holds its time, its line and then its values. */
export const TIME_AT = 0;
export const LINE_AT = 1;
export const VALUES_FROM = 2;

/**
 * Rows one after another in `rows`, `width` numbers each, in order of time; `beforeS` is the time of the row before the first
 * in the same stretch, NaN where a stretch begins. Of what follows, `known` rows in all are there to look at, not to take.
 */
export type TakeRows = (rows: Float64Array, count: number, beforeS: number, known: number) => void;

/**
 * Puts rows in order of time with flat memory. A row that comes up to 1,024 rows late is put in its place. One that comes later
 * is kept where no rows before have covered its time, as when the days of a file stand in another order, and dropped where they
 * have. Of rows with the same time the first is kept.
 */
export class RowSorter {
	readonly spans = new CoveredSpans();
	/** Rows that came out of order and were kept. */
	moved = 0;
	private readonly rows: Float64Array;
	private count = 0;
	private span: CoveredSpan | null = null;
	private nextSpanStartS = Infinity;
	/** Times up to this one have been given on, or belong to the stretch before. */
	private floorS = -Infinity;
	private lastS = -Infinity;
	private isNewSpan = true;
	private highestS = -Infinity;

	constructor(
		private readonly width: number,
		private readonly findings: FindingList,
		private readonly take: TakeRows
	) {
		this.rows = new Float64Array(2 * REACH_ROWS * width);
	}

	add(row: Float64Array): void {
		const timeS = row[TIME_AT]!;
		if (timeS < this.highestS) this.moved++;
		if (this.span === null || !this.belongs(timeS)) {
			if (!this.moveTo(timeS, row)) return;
		}
		if (timeS > this.highestS) this.highestS = timeS;
		if (timeS > this.lastS) {
			this.append(row);
			this.lastS = timeS;
			this.span!.endS = timeS;
		} else this.insert(row);
		if (this.count === 2 * REACH_ROWS) this.giveOn(REACH_ROWS);
	}

	/** Gives on all that waits. */
	flush(): void {
		if (this.count > 0) this.giveOn(this.count);
	}

	private belongs(timeS: number): boolean {
		if (timeS > this.lastS) return timeS - this.lastS <= SPAN_BREAK_S && timeS < this.nextSpanStartS;
		return timeS > this.floorS && this.rows[TIME_AT]! - timeS <= SPAN_BREAK_S;
	}

	/** Goes on in another stretch; false where the time is covered, and the row dropped. */
	private moveTo(timeS: number, row: Float64Array): boolean {
		this.flush();
		if (this.spans.spanAt(timeS) !== null) {
			this.moved -= timeS < this.highestS ? 1 : 0;
			this.findings.dropRow('alreadyCovered', row[LINE_AT]!, null, () => '');
			return false;
		}
		const known = this.spans.list.length;
		const span = this.spans.openAt(timeS);
		if (this.spans.list.length > MOST_SPANS) {
			const found = { line: row[LINE_AT]!, column: null, value: `${MOST_SPANS} jumps of the time` };
			throw new TraceError({ code: 'not_in_order', ...found, limit: 'rows in order of time' });
		}
		this.isNewSpan = this.spans.list.length > known;
		this.span = span;
		this.nextSpanStartS = this.spans.nextStartS(span);
		this.floorS = this.isNewSpan ? this.spans.endBeforeS(span) : span.endS;
		this.lastS = this.isNewSpan ? -Infinity : span.endS;
		return true;
	}

	private append(row: Float64Array): void {
		const from = this.count * this.width;
		for (let at = 0; at < this.width; at++) this.rows[from + at] = row[at]!;
		this.count++;
	}

	private insert(row: Float64Array): void {
		const { rows, width } = this;
		const timeS = row[TIME_AT]!;
		let place = this.count;
		while (place > 0 && rows[(place - 1) * width]! > timeS) place--;
		if (place > 0 && rows[(place - 1) * width] === timeS) {
			this.dropRepeated(row, (place - 1) * width);
			return;
		}
		rows.copyWithin((place + 1) * width, place * width, this.count * width);
		rows.set(row, place * width);
		this.count++;
		if (timeS < this.span!.startS) this.span!.startS = timeS;
	}

	private dropRepeated(row: Float64Array, keptFrom: number): void {
		let same = true;
		for (let at = VALUES_FROM; at < this.width; at++) {
			if (!Object.is(row[at], this.rows[keptFrom + at])) same = false;
		}
		if (row[TIME_AT]! < this.highestS) this.moved--;
		this.findings.dropRow(same ? 'repeated' : 'repeatedDiffering', row[LINE_AT]!, null, () => '');
	}

	private giveOn(count: number): void {
		const { rows, width } = this;
		const beforeS = this.isNewSpan ? NaN : this.floorS;
		this.floorS = rows[(count - 1) * width]!;
		this.take(rows, count, beforeS, this.count);
		this.isNewSpan = false;
		rows.copyWithin(0, count * width, this.count * width);
		this.count -= count;
	}
}
