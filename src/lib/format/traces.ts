import type { NoTraceAir, TraceSpan, TraceState } from '../schemas/traces';
import {
	CELL_REASONS,
	CHANNEL_LAWS,
	clockHourAt,
	ROW_REASONS,
	type CellReason,
	type RowReason,
	type TraceChannel,
	type TraceReport,
	type TraceUnit
} from '../thermal/traces';
import { formatDate, formatShortDate } from './dates';
import { formatNumber, formatWithUnit, THIN_SPACE } from './numbers';
import { formatClock, formatClockHour } from './time';

/** Stands beside everything that comes from figures which nobody measured. */
export const SYNTHETIC = 'Synthetic';
export const SYNTHETIC_SENTENCE =
	'These figures were made up, not measured: nothing in them says how warm a battery gets.';

export const CHANNEL_WORDS: Readonly<Record<TraceChannel, string>> = {
	ambientC: 'Outside air',
	bayAirC: 'Air in the bay',
	exhaustShieldC: 'Heat shield',
	caseC: 'Battery case',
	cellC: 'Cells',
	boardC: 'BMS board',
	currentA: 'Current',
	speedKmh: 'Speed'
};

export type Quantity = 'temperature' | 'current' | 'speed';
export const UNIT_OF: Readonly<Record<Quantity, string>> = { temperature: '°C', current: 'A', speed: 'km/h' };
export const quantityOf = (channel: TraceChannel): Quantity => CHANNEL_LAWS[channel].quantity;
const DECIMALS_OF: Readonly<Record<Quantity, number>> = { temperature: 1, current: 1, speed: 0 };

/** A figure of a channel with its unit; a dash where nothing was measured. */
export function formatReading(channel: TraceChannel, value: number | null): string {
	if (value === null) return '–';
	const quantity = quantityOf(channel);
	return formatWithUnit(value, UNIT_OF[quantity], DECIMALS_OF[quantity]);
}

export const TRACE_STATE_WORDS: Readonly<Record<TraceState, string>> = {
	described: 'columns to be confirmed',
	reading: 'being read',
	read: 'read',
	failed: 'could not be read'
};

export const UNIT_WORDS: Readonly<Record<TraceUnit, string>> = {
	'°C': '°C',
	'°F': '°F',
	A: 'A',
	mA: 'mA',
	'km/h': 'km/h',
	'm/s': 'm/s',
	mph: 'mph'
};

const MEGABYTE = 1024 * 1024;
const KILOBYTE = 1024;
export const formatBytes = (bytes: number): string =>
	bytes < MEGABYTE
		? formatWithUnit(Math.max(bytes / KILOBYTE, 0.1), 'KB', bytes < 10 * KILOBYTE ? 1 : 0)
		: formatWithUnit(bytes / MEGABYTE, 'MB', bytes < 10 * MEGABYTE ? 1 : 0);

export const formatCount = (count: number): string => count.toLocaleString('en-GB');

/** "5,000 rows", "1 row". */
export const sayRows = (count: number): string => `${formatCount(count)} ${count === 1 ? 'row' : 'rows'}`;

export const sayReason = (reason: RowReason | CellReason): string =>
	reason in ROW_REASONS ? ROW_REASONS[reason as RowReason] : CELL_REASONS[reason as CellReason];

/** How the seconds of a trace become times for people. */
export interface TraceClock extends Pick<TraceSpan, 'timeBase' | 'timeZone' | 'startS'> {
	/** Clock hour at which the trace begins; null where nobody knows. */
	startHour: number | null;
}

const HOUR_S = 3600;
const DAY_S = 86_400;

const isDated = ({ timeBase }: TraceClock): boolean => timeBase === 'utc';
const dateAt = ({ timeZone }: TraceClock, atS: number, say: typeof formatDate): string =>
	say(new Date(atS * 1000), timeZone ?? 'UTC');

/** Seconds of the clock at a time, counted from the midnight before the trace; from its start where nobody knows the clock. */
function clockSecondAt(clock: TraceClock, atS: number): number {
	if (clock.startHour === null) return atS - clock.startS;
	if (!isDated(clock)) return clock.startHour * HOUR_S + atS - clock.startS;
	return (clockHourAt(clock, atS) ?? 0) * HOUR_S;
}

const twoDigits = (value: number): string => String(value).padStart(2, '0');
const withSeconds = (second: number): string => {
	const whole = Math.round(second) % DAY_S;
	return `${twoDigits(Math.floor(whole / HOUR_S))}:${twoDigits(Math.floor(whole / 60) % 60)}:${twoDigits(whole % 60)}`;
};

/** A length from the start, for traces of which nobody knows the clock: "2 h 05 min". */
function saySinceStart(seconds: number): string {
	const minutes = Math.round(seconds / 60);
	const [hours, rest] = [Math.floor(minutes / 60), minutes % 60];
	return `${hours}${THIN_SPACE}h ${twoDigits(rest)}${THIN_SPACE}min`;
}

/** A time of a trace in words: "4 Mar 2026, 14:02", "14:02", or "2 h 05 min after the start". */
export function sayTraceTime(clock: TraceClock, atS: number): string {
	const second = clockSecondAt(clock, atS);
	if (clock.startHour === null) return `${saySinceStart(second)} after the start`;
	if (isDated(clock)) return `${dateAt(clock, atS, formatShortDate)}, ${formatClock(second / HOUR_S)}`;
	return formatClockHour(second / HOUR_S);
}

/** From when to when, the date once where it is the same. */
export function sayTraceSpan(clock: TraceClock, fromS: number, toS: number): string {
	const [from, to] = [sayTraceTime(clock, fromS), sayTraceTime(clock, toS)];
	const sameDay = isDated(clock) && dateAt(clock, fromS, formatDate) === dateAt(clock, toS, formatDate);
	return `${from} to ${sameDay ? to.split(', ')[1]! : to}`;
}

type TraceJump = NonNullable<TraceReport['jumps']>['told'][number];

/** A stretch that begins faster than the measured thing can change: "Cells, 10:02 to 10:06: up to 62 K off what stood before". */
export function sayJump(clock: TraceClock, { channel, fromS, toS, offK, stays }: TraceJump): string {
	const off = formatWithUnit(offK, 'K', 0);
	if (stays) return `${CHANNEL_WORDS[channel]}, ${sayTraceTime(clock, fromS)}: ${off} at once, and not back`;
	return `${CHANNEL_WORDS[channel]}, ${sayTraceSpan(clock, fromS, toS)}: up to ${off} off what stood before`;
}

const TICK_STEPS_S = [
	...[1, 2, 5, 10, 30, 60, 120, 300, 600, 900, 1800, HOUR_S, 2 * HOUR_S, 3 * HOUR_S, 6 * HOUR_S, 12 * HOUR_S],
	...[DAY_S, 2 * DAY_S, 5 * DAY_S, 10 * DAY_S, 30 * DAY_S]
];

export interface TimeTick {
	atS: number;
	text: string;
}

function sayTick(clock: TraceClock, atS: number, second: number, stepS: number): string {
	if (clock.startHour === null) {
		return stepS < 60
			? withSeconds(second)
			: `${Math.floor(second / HOUR_S)}:${twoDigits(Math.round((second % HOUR_S) / 60))}`;
	}
	const isMidnight = second % DAY_S === 0;
	if (!isMidnight && stepS < 60) return withSeconds(second);
	if (!isMidnight) return formatClock(second / HOUR_S);
	if (!isDated(clock)) return second === 0 ? '00:00' : `day ${second / DAY_S + 1}`;
	return dateAt(clock, atS, formatShortDate).replace(/ \d{4}$/, '');
}

/** Round times of the clock between two times, at most so many. */
export function listTimeTicks(clock: TraceClock, fromS: number, toS: number, most: number): TimeTick[] {
	const stepS = TICK_STEPS_S.find((step) => (toS - fromS) / step <= most) ?? TICK_STEPS_S.at(-1)!;
	const fromSecond = clockSecondAt(clock, fromS);
	const first = Math.ceil(fromSecond / stepS - 1e-9) * stepS;
	const ticks: TimeTick[] = [];
	for (let second = first; second - fromSecond <= toS - fromS; second += stepS) {
		const atS = fromS + second - fromSecond;
		ticks.push({ atS, text: sayTick(clock, atS, second, stepS) });
	}
	return ticks;
}

const NICE = [1, 2, 2.5, 5, 10];

/** Round figures that hold a range, about so many. */
export function listFigureTicks(low: number, high: number, about: number): number[] {
	const span = Math.max(high - low, 1e-6);
	const power = 10 ** Math.floor(Math.log10(span / about));
	const step = power * (NICE.find((nice) => nice * power >= span / about) ?? 10);
	const first = Math.floor(low / step + 1e-9);
	const last = Math.ceil(high / step - 1e-9);
	return Array.from({ length: last - first + 1 }, (_, at) => Number(((first + at) * step).toPrecision(12)));
}

/** A length of time that each point of a curve stands for: "15 s", "5 min". */
export const sayStep = (stepS: number): string =>
	stepS < 60
		? formatWithUnit(stepS, 's', stepS < 1 ? 1 : 0)
		: formatWithUnit(stepS / 60, 'min', Number.isInteger(stepS / 60) ? 0 : 1);

export const sayLength = (seconds: number): string => saySinceStart(seconds);

/** What the air outside was, as a design day. */
export const sayAir = (
	{ tMaxC, dailyRangeK, offByK }: { tMaxC: number; dailyRangeK: number; offByK: number },
	isSynthetic = false
): string =>
	`${formatNumber(tMaxC, 1)}${THIN_SPACE}°C at the hottest, ${formatNumber(dailyRangeK, 1)}${THIN_SPACE}K from there down to the coolest; ${isSynthetic ? 'the air that was made up' : 'the measured air'} lies ${formatNumber(offByK, 1)}${THIN_SPACE}K from such a day`;

/** Why no design day is found in a trace. */
export const NO_AIR_WORDS: Readonly<Record<NoTraceAir['whyNone'], string>> = {
	'no-air': 'The trace has no outside air, so that no design day can be found in it.',
	'no-hour':
		'The trace does not tell at which time of day it begins: once you say it beside the legs, the design day is looked for.',
	'too-little':
		'The trace sees too little of a day to find the design day in it: less than half of the way from the coolest hour to the hottest.',
	'unlike-a-day':
		'The outside air was told, but it does not go with a design day: it was no warmer at the hours that usually are the hottest. The day that the mount was assessed with stays.'
};
