import { HEAT_KEYS } from '$lib/format/fitted';
import { FieldNote, FieldNoteFinding, FieldNoteStrike, type Installation } from '../db/models';
import type { JudgedNote } from '../presenters/field-notes';

/** In queries: what is found of the note of this alias by what its installation is held against now. */
export const findingBy = (note: string, installation: string): string => `COALESCE(
	(SELECT anew.finding FROM field_note_findings anew WHERE anew.field_note_id = ${note}.id
		AND anew.assessment_id = ${installation}.assessment_id ORDER BY anew.id DESC LIMIT 1),
	${note}.finding)`;

/** In queries: something that the heat depends on is not as it was agreed. */
export const isOtherwise = (installation: string): string =>
	`(${HEAT_KEYS.map((key) => `JSON_SEARCH(${installation}.differences, 'one', '${key}', NULL, '$[*].key') IS NOT NULL`).join(' OR ')})`;

/** The notes of a battery as they came, and what was struck out of them. */
export interface Noted {
	notes: JudgedNote[];
	strikes: FieldNoteStrike[];
}

function judge(note: FieldNote, anew: FieldNoteFinding | undefined): JudgedNote {
	const kept = note.get();
	if (!anew) return { ...kept, learntAt: note.createdAt, findingThen: null };
	return { ...kept, finding: anew.finding, learntAt: anew.createdAt, findingThen: note.finding };
}

/** Every note of these installations, the oldest first. */
export async function readNoted(
	installations: readonly Pick<Installation, 'id' | 'assessmentId'>[]
): Promise<Noted> {
	const heldAgainst = new Map(installations.map(({ id, assessmentId }) => [id, assessmentId]));
	const notes = await FieldNote.findAll({
		where: { installationId: [...heldAgainst.keys()] },
		order: [
			['notedOn', 'ASC'],
			['id', 'ASC']
		]
	});
	const where = { fieldNoteId: notes.map(({ id }) => id) };
	const order: [string, string][] = [['id', 'ASC']];
	const strikes = await FieldNoteStrike.findAll({ where, order });
	const findings = await FieldNoteFinding.findAll({ where, order });
	const anewOf = ({ id, installationId }: FieldNote) =>
		findings.findLast(
			({ fieldNoteId, assessmentId }) =>
				fieldNoteId === id && assessmentId === heldAgainst.get(installationId)
		);
	return { notes: notes.map((note) => judge(note, anewOf(note))), strikes };
}

/** By what notes were weighed: the assessment, the newest note and the newest strike. */
export interface KnownThen {
	assessmentId: number;
	noteId: number;
	strikeId: number;
}

export const knownOf = (
	{ assessmentId }: Pick<Installation, 'assessmentId'>,
	{ notes, strikes }: Noted
): KnownThen => ({
	assessmentId,
	noteId: Math.max(0, ...notes.map(({ id }) => id)),
	strikeId: Math.max(0, ...strikes.map(({ id }) => id))
});

export const isSameKnown = (a: KnownThen, b: KnownThen): boolean =>
	a.assessmentId === b.assessmentId && a.noteId === b.noteId && a.strikeId === b.strikeId;
