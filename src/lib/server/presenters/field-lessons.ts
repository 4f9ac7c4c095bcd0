import { formatTemperature } from '$lib/format/numbers';
import { compareDays, sayDayCount, sayOfTwenty } from '$lib/format/outlook-words';
import { formatClockHour } from '$lib/format/time';
import { hasBms } from '$lib/schemas/batteries';
import type { FieldNoteData } from '$lib/schemas/field-notes';
import type { FieldLesson } from '$lib/schemas/my';
import type { Learning } from '$lib/thermal/field';
import type { JudgedNote } from './field-notes';

/** Of which fitted battery a note tells. */
export interface NotedMount {
	jobId: number;
	mountId: number;
	chemistry: string;
	/** Something that the heat depends on is not as it was agreed. */
	isOtherwise: boolean;
}

const OTHERWISE =
	'That does not change the estimate yet: it was made for what was agreed, and something else was fitted. We work it out for what was fitted first.';

function sayRead(data: FieldNoteData, why: string): string {
	if (data.kind === 'cut-out')
		return `The battery went dark at ${formatClockHour(data.wentDarkHour)} on a day of ${formatTemperature(data.hottestDayC)}${why}.`;
	if (data.kind !== 'peak-label') return '';
	if (data.turnedC === null)
		return `The heat label on the battery has not turned, on days of up to ${formatTemperature(data.hottestDayC)}.`;
	return `The heat label on the battery has turned at ${formatTemperature(data.turnedC)}, on days of up to ${formatTemperature(data.hottestDayC)}.`;
}

const OFTEN_CHANGED = {
	fewer: 'less often than',
	more: 'more often than',
	alike: 'about as often as'
} as const;

function sayLesson({ fits, before, after }: Learning, event: string, isCutOut: boolean): string {
	if (!fits && isCutOut)
		return 'Heat explains that by itself, but it does not agree with what was read on this battery before. The estimate stays as it was, and we look at the battery and the readings again.';
	if (!fits)
		return 'That does not fit what we had thought possible. The estimate stays as it was, and we look at the battery and the reading again.';
	const change = OFTEN_CHANGED[compareDays(before.year.year, after.year.year)];
	return `With that we expect that it ${event} ${change} we had thought. It is still an estimate.`;
}

/** What a note taught about the mount, before and after, in words for the customer; nothing where it taught nothing. */
export function presentLesson(
	note: JudgedNote,
	{ jobId, mountId, chemistry, isOtherwise }: NotedMount
): FieldLesson[] {
	const learning = note.finding?.learning ?? null;
	if (learning === null) return [];
	if (isOtherwise) {
		const read = sayRead(note.data, '');
		return [{ jobId, mountId, on: note.notedOn, read, sentence: OTHERWISE, figures: null }];
	}
	const event = hasBms(chemistry) ? 'goes dark' : 'gets too hot';
	const { before, after, fits } = learning;
	const figures = [
		{
			label: `Days a year on which it ${event}`,
			before: sayDayCount(before.year.year),
			after: sayDayCount(after.year.year)
		},
		{
			label: `Hot days like the planned one on which it ${event}`,
			before: sayOfTwenty(before.cutOutShare),
			after: sayOfTwenty(after.cutOutShare)
		}
	];
	return [
		{
			...{ jobId, mountId, on: note.notedOn, read: sayRead(note.data, ', from heat') },
			sentence: sayLesson(learning, event, note.data.kind === 'cut-out'),
			figures: fits ? figures : null
		}
	];
}
