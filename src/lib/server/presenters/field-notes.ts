import type { FieldNoteView } from '$lib/schemas/field-notes';
import type { FieldNote, FieldNoteStrike } from '../db/models';

/** What has become of a note since. */
interface Standing {
	strike: FieldNoteStrike | null;
	restsOn: FieldNote | null;
	isNotedAnew: boolean;
}

export function presentFieldNote(
	{ id, kind, notedOn, createdBy, data, finding, engineVersion }: FieldNote,
	{ strike, restsOn, isNotedAnew }: Standing,
	nameOf: (personId: number) => string
): FieldNoteView {
	return {
		...{ id, kind, notedOn, notedBy: nameOf(createdBy), data, finding: finding ?? null, engineVersion },
		struck: strike && {
			...{ by: nameOf(strike.createdBy), at: strike.createdAt.toISOString(), reason: strike.reason }
		},
		restsOnStruck: restsOn && { noteId: restsOn.id, notedOn: restsOn.notedOn, isNotedAnew }
	};
}
