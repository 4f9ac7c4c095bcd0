import { listHeatDifferences } from '$lib/format/fitted';
import { isEveningPattern } from '$lib/thermal/field';
import type { Installation } from '../db/models';
import { readingOf } from './field-readings';
import type { JudgedNote } from '../presenters/field-notes';
import type { Noted } from './judged-notes';

/** One such evening may be anything; two that the model does not explain speak against the model. */
const FEWEST_EVENINGS = 2;

function contradicts({ data, finding }: JudgedNote): boolean {
	const reading = readingOf(data);
	if (data.kind !== 'cut-out' || reading?.kind !== 'cut-out') return false;
	return finding?.cause?.finding === 'not-explained' && isEveningPattern(reading.report, data.hottestDayC);
}

/**
 * How many evenings as heat makes them the model does not explain, by note; a note that is no such evening, or stands
 * alone, is not there. Where something else was fitted than the model knows, that comes first.
 */
export function countDoubts(
	{ notes, strikes }: Noted,
	installations: readonly Pick<Installation, 'id' | 'agreed' | 'differences'>[]
): ReadonlyMap<number, number> {
	const struck = new Set(strikes.map(({ fieldNoteId }) => fieldNoteId));
	const doubts = new Map<number, number>();
	for (const installation of installations) {
		if (listHeatDifferences(installation).length > 0) continue;
		const evenings = notes.filter(
			(note) => note.installationId === installation.id && !struck.has(note.id) && contradicts(note)
		);
		if (evenings.length < FEWEST_EVENINGS) continue;
		for (const { id } of evenings) doubts.set(id, evenings.length);
	}
	return doubts;
}
