import type { FieldLesson } from '$lib/schemas/my';
import { Assessment, FieldNote, FieldNoteStrike, Installation } from '../db/models';
import { presentLesson } from '../presenters/field-lessons';
import { standNotes } from './field-standing';

/** What the field has taught about the fitted batteries of these jobs, the newest first; not what a strike took away. */
export async function listLessons(jobIds: readonly number[]): Promise<FieldLesson[]> {
	const installations = await Installation.findAll({ where: { jobId: [...jobIds] } });
	const assessments = await Assessment.findAll({
		where: { id: installations.map(({ assessmentId }) => assessmentId) },
		attributes: ['id', 'chemistry']
	});
	const notes = await FieldNote.findAll({
		where: { installationId: installations.map(({ id }) => id) },
		order: [
			['notedOn', 'DESC'],
			['id', 'DESC']
		]
	});
	const strikes = await FieldNoteStrike.findAll({ where: { fieldNoteId: notes.map(({ id }) => id) } });
	const standings = standNotes(notes, strikes);
	return notes.flatMap((note) => {
		const { strike, restsOn } = standings.get(note.id)!;
		if (strike || restsOn) return [];
		const { jobId, mountId, assessmentId } = installations.find(({ id }) => id === note.installationId)!;
		const chemistry = assessments.find(({ id }) => id === assessmentId)?.chemistry ?? '';
		return presentLesson(note, { jobId, mountId, chemistry });
	});
}
