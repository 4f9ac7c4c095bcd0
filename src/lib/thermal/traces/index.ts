/** Traces of loggers: what a file is, its rows, what is kept of it, how it is looked at, and the day plan in it. */
export { ambientFromTrace, type MeasuredAmbient } from './ambient-from-trace';
export {
	BIN_STEPS_S,
	channelsOf,
	coarsenTrace,
	endOf,
	minuteBins,
	MOST_BINS,
	type BinnedTrace,
	type ChannelBins
} from './binned-trace';
export { findChangePoints, type ChangeSignal } from './change-points';
export {
	CHANNEL_LAWS,
	TRACE_CHANNELS,
	TRACE_UNITS,
	toChannelUnit,
	type TraceChannel,
	type TraceUnit
} from './channels';
export { describeTrace, SAMPLE_BYTES, type ColumnProposal, type TraceProposal } from './describe-trace';
export { DATE_ORDER_WORDS, type TimeProposal } from './find-time';
export {
	CELL_REASONS,
	ROW_REASONS,
	type CellCounts,
	type CellReason,
	type RowReason,
	type TraceFinding
} from './findings';
export { loggerFingerprint } from './fingerprint';
export { GAPS_TOLD, type TraceGap } from './interval-tally';
export {
	checkMapping,
	DATE_ORDERS,
	DECIMALS,
	DELIMITERS,
	zoneOf,
	type ColumnMapping,
	type DateOrder,
	type Decimal,
	type Delimiter,
	type TimeMapping,
	type TraceMapping
} from './mapping';
export { clockHourAt, dayPlanFromLegs, scenarioLegs, type PlanChoices } from './plan-from-legs';
export { proposeLegs, type LegOptions } from './propose-legs';
export { TraceReader } from './read-trace';
export {
	GAP_INTERVALS,
	LONGEST_TRACE_S,
	MOST_TRACE_BYTES,
	MOST_TRACE_ROWS,
	type ReadOptions,
	type TraceReading,
	type TraceRows
} from './reading-types';
export type { TimeBase } from './time-reader';
export { decodeTrace, encodeTrace } from './trace-code';
export { TRACE_ERROR_CODES, TraceError, type TraceErrorCode, type TraceFault } from './trace-error';
export {
	joinLegs,
	measureLegs,
	moveBoundary,
	setLegKind,
	splitLeg,
	type LegState,
	type TraceLeg
} from './trace-legs';
export type { TraceReport } from './trace-report';
export { TraceView, type TraceCurve } from './trace-view';
export { isTimeZone, ZoneClock } from './zone-clock';
