import type { TraceChannel } from './channels';
import type { CellCounts, RowReason, TraceFinding } from './findings';
import type { TraceJump } from './find-jumps';
import type { TraceGap } from './interval-tally';

/**
 * What became of everything that a file held. Two sums always hold:
 *
 *     lines = before + blank + comments + rows.read;   rows.read = rows.kept + Σ rows.dropped
 *     for each channel, over the rows with a time: rows.timed = values + Σ reasons
 */
export interface TraceReport {
	bytes: number;
	lines: {
		/** Lines that rows begin on; a cell with a line end in it makes no new one. */
		total: number;
		/** What stands over the first row. */
		before: number;
		blank: number;
		comments: number;
	};
	rows: {
		read: number;
		/** Those with a time and all their columns, repeated ones too: what the counts of cells are of. */
		timed: number;
		kept: number;
		dropped: Record<RowReason, number>;
		/** Kept ones that came out of order. */
		moved: number;
	};
	cells: Partial<Record<TraceChannel, CellCounts>>;
	/** Median of the time from row to row, s. */
	medianIntervalS: number;
	/** Stretches without rows longer than `overS`: all of them counted, the longest told. */
	gaps: { overS: number; count: number; told: TraceGap[] };
	/** Stretches that begin faster than the measured thing can change: kept, to be looked at. Not there in older reports. */
	jumps?: { count: number; told: TraceJump[] };
	/** Rows at local times that come twice or never, where the clocks are changed. */
	clockChanges: { twiceRows: number; neverRows: number };
	/** The first few of each reason, in the order in which they were found. */
	findings: TraceFinding[];
}
