import { listHeatDifferences } from '$lib/format/fitted';
import type { FieldLesson } from '$lib/schemas/my';
import { Assessment, Installation } from '../db/models';
import { presentLesson } from '../presenters/field-lessons';
import { standNotes } from './field-standing';
import { readNoted } from './judged-notes';

/** What the field has taught about the fitted batteries of these jobs, the newest first; not what a strike took away. */
export async function listLessons(jobIds: readonly number[]): Promise<FieldLesson[]> {
	const installations = await Installation.findAll({ where: { jobId: [...jobIds] } });
	const assessments = await Assessment.findAll({
		where: { id: installations.map(({ assessmentId }) => assessmentId) },
		attributes: ['id', 'chemistry']
	});
	const { notes, strikes } = await readNoted(installations);
	const standings = standNotes(notes, strikes);
	return [...notes].reverse().flatMap((note) => {
		const { strike, restsOn } = standings.get(note.id)!;
		if (strike || restsOn) return [];
		const installation = installations.find(({ id }) => id === note.installationId)!;
		const { jobId, mountId, assessmentId } = installation;
		const chemistry = assessments.find(({ id }) => id === assessmentId)?.chemistry ?? '';
		const isOtherwise = listHeatDifferences(installation).length > 0;
		return presentLesson(note, { jobId, mountId, chemistry, isOtherwise });
	});
}
