import type { Reading, TraceHold } from '../schemas/accuracy';
import { LEFT_OUT_WORDS, sayMeasured, sayOff, sayPredicted } from './accuracy-words';
import { formatPercent } from './numbers';

export const BEING_HELD =
	'How this trace lies beside what had been predicted of its day is being worked out, which takes a few seconds for each month of it.';

export const sayHoldProgress = (share: number): string =>
	`How this trace lies beside what had been predicted of its day is being worked out: ${formatPercent(share)}`;

export const NOT_HELD_WORDS: Record<(TraceHold & { state: 'none' })['why'], string> = {
	'no-assessment':
		'Nothing was predicted of this day yet: the mount has not been assessed. Once it is, the trace is held against that.',
	'no-hour':
		'No prediction can be held against this trace while nobody has said at which time of day it begins: say it with the legs.',
	'no-run':
		'No prediction could be held against this trace, for want of a temperature of the battery, or of legs that can be run.'
};

const PLACES: Record<string, string> = { cells: 'cells', board: 'BMS board', case: 'case' };

/** Whether the trace is in the figures of the accuracy. */
export const sayWhatCounts = ({ leftOut, isEnteredLater }: Reading): string =>
	[
		leftOut ? `It is not counted: ${LEFT_OUT_WORDS[leftOut]}.` : 'It is counted.',
		...(isEnteredLater ? ['The assessment was entered after the day of the trace.'] : [])
	].join(' ');

/** What was measured, beside what was predicted: the means over the trace. */
export function listHeld(reading: Reading): { label: string; value: string; note?: string }[] {
	const place = PLACES[reading.trace?.place ?? ''] ?? '';
	return [
		{ label: `Measured at the ${place}`, value: sayMeasured(reading), note: 'Mean over the trace.' },
		{
			label: 'Predicted',
			value: sayPredicted(reading),
			note: 'On the air as it was measured, with its band of nine in ten.'
		},
		{ label: 'How far off', value: sayOff(reading) }
	];
}

/** Of the page of all of them. */
export const sayHolding = (waiting: number): string =>
	`${waiting} ${waiting === 1 ? 'trace is' : 'traces are'} not in these figures yet: how ${waiting === 1 ? 'it lies' : 'they lie'} beside what had been predicted is being worked out.`;
