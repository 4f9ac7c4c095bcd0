import type { FieldFinding, FieldNoteInput } from '$lib/schemas/field-notes';
import { parseScenario } from '$lib/thermal';
import { learnFrom, weighHeat, type ReadingDay } from '$lib/thermal/field';
import type { Assessment } from '../db/models';
import { readingOf, scenarioOn } from './field-readings';
import { listTeaching, standNotes } from './field-standing';
import type { JudgedNote } from '../presenters/field-notes';
import type { Noted } from './judged-notes';
import { afterOthers, workInSlices } from './slices';
import { touringOf } from './touring-year';

/** How many vehicles and mounts, and how many of them for the days in a year, are drawn to learn from a note. */
export interface LearningEffort {
	samples: number;
	yearSamples: number;
}
export const FULL_LEARNING: LearningEffort = { samples: 512, yearSamples: 32 };
/** The same of fewer draws, said beside what comes of it. */
export const LIGHT_LEARNING: LearningEffort = { samples: 128, yearSamples: 8 };

function listReadings(assessment: Assessment, { notes, strikes }: Noted): ReadingDay[] {
	return listTeaching(notes, strikes).flatMap(({ data }) => {
		const reading = readingOf(data);
		if (reading === null || !('hottestDayC' in data)) return [];
		return [{ scenario: scenarioOn(assessment, data.hottestDayC), reading }];
	});
}

/** Was it heat, and what does it teach? Worked out in slices, one after the other. */
export async function findOut(
	assessment: Assessment,
	earlier: Noted,
	data: FieldNoteInput,
	{ seed, samples, yearSamples }: LearningEffort & { seed: number }
): Promise<FieldFinding | null> {
	const reading = readingOf(data);
	if (reading === null || !('hottestDayC' in data)) return null;
	const scenario = scenarioOn(assessment, data.hottestDayC);
	return afterOthers(async () => {
		const cause =
			reading.kind === 'cut-out'
				? await workInSlices(weighHeat(scenario, reading.report, { samples, seed }))
				: null;
		if (cause && cause.finding !== 'explained') return { cause, learning: null };
		const { tMax } = parseScenario(assessment.inputs.scenario).climate;
		const days = [...listReadings(assessment, earlier), { scenario, reading }];
		const options = { samples, yearSamples, seed };
		const work = learnFrom(scenarioOn(assessment, tMax), days, touringOf(assessment.inputs), options);
		return { cause, learning: await workInSlices(work) };
	});
}

/** What a note came to by another assessment. */
export interface FoundAnew {
	noteId: number;
	finding: FieldFinding;
}

/**
 * Every note that still counts and says something of heat, by another assessment than before, one after the other: each
 * learns with what those before it came to. Of a reading that was noted once more, only the later note is taken.
 */
export async function findAllAnew(
	assessment: Assessment,
	{ notes, strikes }: Noted,
	effort: LearningEffort & { seed: number }
): Promise<FoundAnew[]> {
	const standings = standNotes(notes, strikes);
	const counts = ({ id }: JudgedNote): boolean => {
		const { strike, isNotedAnew } = standings.get(id)!;
		return strike === null && !isNotedAnew;
	};
	const asKept = notes.filter(counts).sort((a, b) => a.id - b.id);
	const found: FoundAnew[] = [];
	const earlier: JudgedNote[] = [];
	for (const note of asKept) {
		const finding = await findOut(assessment, { notes: earlier, strikes: [] }, note.data, effort);
		if (finding) found.push({ noteId: note.id, finding });
		earlier.push({ ...note, finding });
	}
	return found;
}
