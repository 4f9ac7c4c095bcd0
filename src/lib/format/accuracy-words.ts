import type {
	ChanceBin,
	DaysFigures,
	ErrorFigures,
	Grouping,
	LeftOut,
	Reading,
	ReadingKind
} from '../schemas/accuracy';
import { formatDays, formatRatioRange, sayRatio } from './review-words';
import {
	formatKelvin,
	formatKelvinChange,
	formatNumber,
	formatPercent,
	formatTemperature,
	MINUS
} from './numbers';

export const KIND_WORDS: Record<ReadingKind, string> = {
	label: 'Peak label',
	trace: 'Trace',
	'cut-out': 'Cut-outs',
	capacity: 'Capacity test'
};

/** In the middle of a sentence, of many. */
export const KIND_PLURALS: Record<ReadingKind, string> = {
	label: 'label readings',
	trace: 'traces',
	'cut-out': 'reports of cut-outs',
	capacity: 'capacity tests'
};

export const KIND_UNITS: Record<ReadingKind, string> = {
	label: 'K',
	trace: 'K',
	'cut-out': 'days',
	capacity: '% of the capacity'
};

export const GROUPING_WORDS: Record<Grouping, string> = {
	book: 'Book',
	zone: 'Climate',
	position: 'Position'
};

export const LEFT_OUT_WORDS: Record<LeftOut, string> = {
	struck: 'struck out as a slip of the pen',
	'noted-again': 'put right by a later note of the same day',
	'fits-nothing': 'outside, with those before it, of all that was held possible',
	'fitted-to': 'foretold by a book that had been fitted to it',
	'sent-again': 'sent in before as the same file',
	'no-date': 'of a day that its logger did not tell',
	'no-air': 'without the outside air, which makes the day',
	'legs-open': 'with legs that nobody has confirmed yet'
};

export const TOO_FEW = 'too few to tell';

/** Percentage points, with a plus for more than predicted. */
export function formatPointsChange(share: number): string {
	const text = formatPercent(share, 1);
	return Number((share * 100).toFixed(1)) > 0 ? `+${text}` : text;
}

/** A change in the unit of its kind. */
export function formatError(kind: ReadingKind, error: number): string {
	if (kind === 'capacity') return formatPointsChange(error);
	if (kind !== 'cut-out') return formatKelvinChange(error);
	const text = formatDaysCount(error);
	return error > 0 && !text.startsWith(MINUS) ? `+${text}` : text;
}

const formatDaysCount = (days: number): string =>
	Number.isInteger(days) ? formatNumber(days) : formatDays(days);

/** "86 % (71 to 95)". */
export function formatShareRange({ value, low, high }: { value: number; low: number; high: number }): string {
	return `${formatPercent(value)} (${formatNumber(low * 100)} to ${formatNumber(high * 100)})`;
}

const formatSize = (kind: ReadingKind, size: number): string =>
	kind === 'capacity' ? formatPercent(size, 1) : formatKelvin(size);

/** Readings, mean error, usual size of an error, share inside the band: the cells of a row. */
export function errorCells(
	kind: ReadingKind,
	{ readings, bias, rootMeanSquare, insideShare }: ErrorFigures
): string[] {
	if (bias === null || rootMeanSquare === null || insideShare === null)
		return [String(readings), TOO_FEW, '', ''];
	return [
		String(readings),
		formatError(kind, bias),
		formatSize(kind, rootMeanSquare),
		formatShareRange(insideShare)
	];
}

/** Installations, time observed, stated and reported days a year, and their ratio: the cells of a row. */
export function daysCells({
	installations,
	observedYears,
	statedDaysAYear,
	reportedDaysAYear,
	ratio
}: DaysFigures): string[] {
	const head = [String(installations), formatNumber(observedYears, 1)];
	if (statedDaysAYear === null || reportedDaysAYear === null) return [...head, TOO_FEW, '', ''];
	return [
		...head,
		formatDays(statedDaysAYear),
		formatDays(reportedDaysAYear),
		ratio === null ? 'nothing stated' : formatRatioRange(ratio)
	];
}

/** "5 to 15 %". */
export const sayBin = ({ from, to }: Pick<ChanceBin, 'from' | 'to'>): string =>
	`${formatNumber(from * 100)} to ${formatPercent(to)}`;

/** The cells of a bin: installations, mean stated chance, went dark, observed share. */
export function binCells({ installations, statedShare, wentDark, observedShare }: ChanceBin): string[] {
	if (installations === 0) return ['0', '', '', ''];
	return [
		String(installations),
		statedShare === null ? '' : formatPercent(statedShare),
		String(wentDark),
		observedShare === null ? TOO_FEW : formatShareRange(observedShare)
	];
}

/** What a mean error says of the predictions. */
export function sayBias(kind: ReadingKind, bias: number, rootMeanSquare: number): string {
	const size = formatSize(kind, Math.abs(bias));
	const isSmall = Math.abs(bias) < rootMeanSquare / 5;
	if (isSmall) return `On average they lie ${size} from what was predicted, small beside the usual error`;
	const [more, less] = kind === 'capacity' ? ['above', 'below'] : ['hotter than', 'cooler than'];
	return `On average they lie ${size} ${bias > 0 ? more : less} what was predicted`;
}

/** What the share inside a band of nine in ten says. */
export function sayInside({ low, high }: { low: number; high: number }): string {
	if (high < 0.9) return 'fewer than the nine in ten that were stated: the band is too narrow';
	if (low > 0.9) return 'more than the nine in ten that were stated: the band is wider than it need be';
	return 'which agrees with the nine in ten that were stated';
}

/** What was measured, in the words of its kind. */
export function sayMeasured({ kind, measured, label }: Reading): string {
	if (kind === 'cut-out') return `${formatNumber(measured ?? 0)} reported`;
	if (kind === 'capacity') return formatPercent(measured ?? 0, 1);
	if (label === null) return measured === null ? '' : formatTemperature(measured, 1);
	const { turnedC, notTurnedC } = label;
	if (turnedC === null) return `below ${formatTemperature(notTurnedC!)}`;
	if (notTurnedC === null) return `${formatTemperature(turnedC)} or more`;
	return `${formatNumber(turnedC)} to ${formatTemperature(notTurnedC)}`;
}

/** What was predicted with its band: "61 °C (55 to 68)". */
export function sayPredicted({ kind, predicted, low, high }: Reading): string {
	if (kind === 'cut-out')
		return `${formatDays(predicted)} stated (${formatNumber(low)} to ${formatNumber(high)})`;
	if (kind === 'capacity')
		return `${formatPercent(predicted, 1)} (${formatNumber(low * 100, 1)} to ${formatNumber(high * 100, 1)})`;
	return `${formatTemperature(predicted, 1)} (${formatNumber(low, 1)} to ${formatNumber(high, 1)})`;
}

/** The error with how far off it is: "+7.5 K, 2.1 standard deviations". */
export function sayOff({ kind, error, deviations, stand }: Reading): string {
	const deviation = `${formatNumber(Math.abs(deviations), 1)} standard deviations`;
	if (error === null) return stand === 'inside' ? 'gainsays nothing' : `at least ${deviation} off`;
	return `${formatError(kind, error)}, ${deviation}`;
}

const plural = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

const KIND_SINGULARS: Record<ReadingKind, string> = {
	label: 'label reading',
	trace: 'trace',
	'cut-out': 'report of cut-outs',
	capacity: 'capacity test'
};

/** What the errors of a kind come to, in sentences. */
export function sayErrors(kind: ReadingKind, figures: ErrorFigures, fewest: number): string {
	const { readings, bias, rootMeanSquare, insideShare } = figures;
	const count = plural(readings, KIND_SINGULARS[kind], KIND_PLURALS[kind]);
	if (bias === null || rootMeanSquare === null || insideShare === null)
		return `${count} so far: ${TOO_FEW}. From ${fewest} on figures stand here.`;
	const band =
		kind === 'capacity'
			? `${formatShareRange(insideShare)} lie inside the band of the ageing models.`
			: `${formatShareRange(insideShare)} lie inside the stated band, ${sayInside(insideShare)}.`;
	return `${count}. ${sayBias(kind, bias, rootMeanSquare)}; the usual error (root mean square) is ${formatSize(kind, rootMeanSquare)}. ${band}`;
}

/** What stands apart from the figures of a kind, each in a sentence; nothing where nothing does. */
export function sayBeside({ oneSided, oneSidedOutside, enteredLater }: ErrorFigures): string[] {
	return [
		...(oneSided > 0
			? [
					`${plural(oneSided, 'reading more says', 'readings more say')} a side only, as no field had turned or all had: ${oneSidedOutside} of them ${oneSidedOutside === 1 ? 'gainsays' : 'gainsay'} the stated band. They have no error, and are not in the figures.`
				]
			: []),
		...(enteredLater > 0
			? [
					`${plural(enteredLater, 'reading is', 'readings are')} older than the record here of the assessment beside ${enteredLater === 1 ? 'it' : 'them'}: the battery was entered after the day.`
				]
			: [])
	];
}

/** What was stated and reported of cut-outs, in a sentence. */
export function sayDays(figures: DaysFigures, fewest: number): string {
	const { installations, observedYears, statedDays, reportedDays, ratio } = figures;
	const time = `${plural(installations, 'installation', 'installations')}, ${formatNumber(observedYears, 1)} years together`;
	const days = `${formatDays(statedDays)} cut-out days stated, ${reportedDays} reported`;
	if (installations < fewest) return `${time}: ${days}. These are ${TOO_FEW}.`;
	if (ratio === null) return `${time}: ${days}. Next to nothing was stated, so no ratio is formed.`;
	return `${time}: ${days}, ${formatRatioRange(ratio)} times as many; ${sayRatio(ratio)}.`;
}

const sayLeftOutKind = (kind: ReadingKind, readings: number): string =>
	plural(readings, KIND_SINGULARS[kind], KIND_PLURALS[kind]);

/** What does not count, and why, in a sentence. */
export function sayLeftOut({
	kind,
	why,
	readings,
	inside
}: {
	kind: ReadingKind;
	why: LeftOut;
	readings: number;
	inside: number;
}): string {
	return `${sayLeftOutKind(kind, readings)}, ${LEFT_OUT_WORDS[why]} (${inside} of ${readings} inside the stated band)`;
}

/** Says of measured traces that they stand in none of the figures, and what each may lack. */
export const sayUnheld = (traces: number): string =>
	`${traces} measured ${traces === 1 ? 'trace is' : 'traces are'} in none of these figures: nothing could be held against ${traces === 1 ? 'it' : 'them'}, for want of an assessment of the mount, the hour at which it began, a temperature of the battery, or legs that can be run.`;
