import type { BinnedTrace } from './binned-trace';
import type { TraceChannel } from './channels';
import { TIME_AT, VALUES_FROM } from './row-sorter';
import type { TraceReport } from './trace-report';

export const MOST_TRACE_BYTES = 200 * 1024 * 1024;
export const MOST_TRACE_ROWS = 5_000_000;
export const LONGEST_TRACE_S = 60 * 86_400;
/** A gap is longer than so many median intervals, where nobody says otherwise. */
export const GAP_INTERVALS = 5;

/** Kept rows in order of time. */
export interface TraceRows {
	count: number;
	timeS: Float64Array;
	/** °C, A or km/h; NaN where there is no value. */
	values: Partial<Record<TraceChannel, Float64Array>>;
}

export interface ReadOptions {
	/** The line of the first row, as describeTrace says; without it the first row is the first that has a time and a number. */
	firstRowLine?: number;
	gapIntervals?: number;
	onRows?: (rows: TraceRows) => void;
}

export interface TraceReading {
	trace: BinnedTrace;
	report: TraceReport;
}

/** Rows as the sorter gives them on, turned into a column for each channel. */
export function toColumns(rows: Float64Array, count: number, channels: readonly TraceChannel[]): TraceRows {
	const width = VALUES_FROM + channels.length;
	const column = (at: number) => Float64Array.from({ length: count }, (_, row) => rows[row * width + at]!);
	const values = channels.map((channel, at) => [channel, column(VALUES_FROM + at)]);
	return { count, timeS: column(TIME_AT), values: Object.fromEntries(values) };
}
