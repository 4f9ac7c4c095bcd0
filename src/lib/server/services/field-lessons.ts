import type { FieldLesson } from '$lib/schemas/my';
import { Assessment, FieldNote, Installation } from '../db/models';
import { presentLesson } from '../presenters/field-lessons';

/** What the field has taught about the fitted batteries of these jobs, the newest first. */
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
	return notes.flatMap((note) => {
		const { jobId, mountId, assessmentId } = installations.find(({ id }) => id === note.installationId)!;
		const chemistry = assessments.find(({ id }) => id === assessmentId)?.chemistry ?? '';
		return presentLesson(note, { jobId, mountId, chemistry });
	});
}
