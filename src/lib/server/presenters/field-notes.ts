import type { FieldNoteView } from '$lib/schemas/field-notes';
import type { FieldNote } from '../db/models';

export function presentFieldNote(
	{ id, kind, notedOn, data, finding, engineVersion }: FieldNote,
	notedBy: string
): FieldNoteView {
	return { id, kind, notedOn, notedBy, data, finding: finding ?? null, engineVersion };
}
