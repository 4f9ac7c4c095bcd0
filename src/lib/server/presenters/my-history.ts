import { formatDate } from '$lib/format/dates';
import { JUDGED_ANEW_PLAINLY, sayDoubtPlainly, UNJUDGED_PLAINLY } from '$lib/format/field-doubt-words';
import { formatCapacity, formatTemperature } from '$lib/format/numbers';
import { formatClockHour } from '$lib/format/time';
import { sayVerdict } from '$lib/format/verdict';
import type { FieldNoteData } from '$lib/schemas/field-notes';
import {
	customerPaperPath,
	type CustomerDocument,
	type CustomerPaper,
	type HistoryEntry
} from '$lib/schemas/my';
import type { Question } from '$lib/schemas/questions';
import type { FieldNoteStrike, FollowUp, Installation, Sheet } from '../db/models';
import type { JudgedNote } from './field-notes';

export function presentSheetDocument({ id, jobId, content, createdAt }: Sheet): CustomerDocument {
	const verdict = sayVerdict(content.verdict, content.chemistry ?? '');
	return {
		...{ jobId, title: `Your battery on a hot day: ${content.mountName}` },
		about: `On a hot day it ${verdict}`,
		at: createdAt.toISOString(),
		href: `/my/${id}`
	};
}

const presentPaper = (paper: CustomerPaper) => ({ paper, href: customerPaperPath(paper) });

/** The whole recommendation behind such pages, once for each however many were sent. */
export function presentRecommendationDocuments(sheets: readonly Sheet[]): CustomerDocument[] {
	const newest = new Map(sheets.map((sheet) => [sheet.recommendationId, sheet]));
	return [...newest.values()].map(({ jobId, content, createdAt, recommendationId }) => ({
		...{ jobId, title: `Recommendation: ${content.mountName} (PDF)` },
		about: 'All that went into it, its figures and its cautions',
		at: createdAt.toISOString(),
		...presentPaper({ kind: 'recommendation', id: recommendationId })
	}));
}

export const presentHandoverDocument = ({ mountId, jobId, fittedOn }: Installation): CustomerDocument => ({
	...{
		jobId,
		title: 'Handover of your battery (PDF)',
		about: 'What was fitted, what to expect, when to look at it'
	},
	at: `${fittedOn}T00:00:00.000Z`,
	...presentPaper({ kind: 'handover', id: mountId })
});

type Told = Omit<HistoryEntry, 'jobId'>;
const atMoment = (at: Date, title: string, words: string): Told => ({
	...{ at: at.toISOString(), isDay: false, title, words }
});
const onDay = (day: string, title: string, words: string): Told => ({
	...{ at: `${day}T00:00:00.000Z`, isDay: true, title, words }
});

/** The story of one page: sent, read, acknowledged, withdrawn. */
export function tellSheet(sheet: Sheet): HistoryEntry[] {
	const { jobId, content, createdAt, firstOpenedAt, withdrawnAt, acknowledgement } = sheet;
	const about = content.mountName;
	return [
		atMoment(createdAt, 'Page sent', `${content.workshop.name} sent you a page about: ${about}.`),
		...(firstOpenedAt ? [atMoment(firstOpenedAt, 'Page opened', `First opened: ${about}.`)] : []),
		...(acknowledgement
			? [atMoment(acknowledgement.createdAt, 'Page acknowledged', `By ${acknowledgement.name}: ${about}.`)]
			: []),
		...(withdrawnAt
			? [atMoment(withdrawnAt, 'Page withdrawn', `No longer the one that counts: ${about}.`)]
			: [])
	].map((told) => ({ ...told, jobId }));
}

export function tellFitting({ jobId, fittedOn, fittedBy, agreed, differences }: Installation): HistoryEntry {
	const of = (key: string): string =>
		differences.find((each) => each.key === key)?.fitted ??
		agreed.find((each) => each.key === key)?.agreed ??
		'';
	const otherwise =
		differences.length === 0
			? 'As agreed.'
			: `${differences.length} of ${agreed.length} things otherwise than agreed.`;
	const words = `${of('battery')}, position ${of('position')}, by ${fittedBy}. ${otherwise}`;
	return { jobId, ...onDay(fittedOn, 'Battery fitted', words) };
}

const afterMonths = (months: number): string => (months === 1 ? 'one month' : `${months} months`);

export function tellFollowUp(followUp: FollowUp, jobId: number): HistoryEntry[] {
	if (!followUp.doneOn) return [];
	const words = `The look after ${afterMonths(followUp.afterMonths)}, by ${followUp.doneBy ?? 'the shop'}.`;
	return [{ jobId, ...onDay(followUp.doneOn, 'Battery looked at', words) }];
}

export const sayDue = ({ afterMonths: months, dueOn }: FollowUp): string =>
	`${formatDate(dueOn)}, the look after ${afterMonths(months)}`;

const NOTE_TITLES: Readonly<Record<FieldNoteData['kind'], string>> = {
	'capacity-test': 'Capacity tested',
	inspection: 'Battery inspected',
	'peak-label': 'Heat label read',
	'cut-out': 'Went dark'
};

function sayNote(data: FieldNoteData): string {
	switch (data.kind) {
		case 'inspection':
			return data.words;
		case 'capacity-test':
			return `It holds ${formatCapacity(data.capacityAh)}.`;
		case 'peak-label':
			return data.turnedC === null
				? 'No field of it has turned.'
				: `Its field for ${formatTemperature(data.turnedC)} has turned.`;
		case 'cut-out': {
			const back =
				data.cameBackHour === null ? '' : `, back by itself at ${formatClockHour(data.cameBackHour)}`;
			return `At ${formatClockHour(data.wentDarkHour)}${back}, on a day of ${formatTemperature(data.hottestDayC)}.`;
		}
	}
}

const CAUSES = {
	explained: 'Heat alone explains it.',
	possible: 'Heat alone may explain it.',
	'not-explained': 'Heat alone hardly explains it: the shop looks for another cause.'
} as const;

/** How the answers about a battery are to be taken. */
interface NoteAround {
	/** Something that the heat depends on is not as it was agreed. */
	isOtherwise: boolean;
	/** Evenings as heat makes them that the estimate does not explain, this being one of several. */
	doubts: number;
}

function sayCause({ finding, findingThen }: JudgedNote, { isOtherwise, doubts }: NoteAround): string[] {
	if (!finding?.cause) return [];
	if (isOtherwise) return [UNJUDGED_PLAINLY];
	const cause = doubts > 0 ? sayDoubtPlainly(doubts) : CAUSES[finding.cause.finding];
	return findingThen ? [cause, JUDGED_ANEW_PLAINLY] : [cause];
}

/** A note that was struck out says so, and no more: its figures, and the reason with them, were a slip. */
export function tellNote(
	note: JudgedNote,
	jobId: number,
	{ strike, ...around }: NoteAround & { strike: FieldNoteStrike | null }
): HistoryEntry {
	const { data, notedOn } = note;
	const title = NOTE_TITLES[data.kind];
	if (strike) {
		const words = `Struck out by the shop on ${formatDate(strike.createdAt)}: it does not count.`;
		return { jobId, ...onDay(notedOn, title, words) };
	}
	return { jobId, ...onDay(notedOn, title, [sayNote(data), ...sayCause(note, around)].join(' ')) };
}

export function tellQuestions(questions: readonly Question[], jobId: number): HistoryEntry[] {
	return questions.flatMap(({ at, name, words, answers }) => [
		{ jobId, at, isDay: false, title: 'Question asked', words: `${name}: ${words}` },
		...answers.map((answer) => ({
			...{ jobId, at: answer.at, isDay: false, title: 'Question answered' },
			words: `${answer.name}: ${answer.words}`
		}))
	]);
}
