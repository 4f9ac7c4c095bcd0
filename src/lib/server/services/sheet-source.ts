import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import type { SheetSource } from '../presenters/sheet-content';
import { getRecommendationDocument, newestRecommendation } from './recommendations';

const SUPERSEDED = 'There is a newer recommendation for this job: send that one.';

/** Collects what a sheet is written from. Only the newest recommendation of a job may go to its customer. */
export async function readSheetSource(
	person: SignedInPerson,
	recommendationId: number
): Promise<SheetSource & { jobId: number }> {
	const { recommendation, assessment, workshop, others } = await getRecommendationDocument(
		person,
		recommendationId
	);
	const { jobId, againstVerdict, decidedBy, reason } = recommendation;
	const newest = await newestRecommendation(person, jobId);
	if (newest?.id !== recommendationId)
		throw new AppError('conflict', SUPERSEDED, [{ path: 'recommendationId', message: SUPERSEDED }]);
	return {
		...{ jobId, workshop },
		preparedBy: person.name,
		preparedAt: new Date(),
		assessmentId: assessment.id,
		inputs: assessment.inputs,
		result: assessment.result,
		override: againstVerdict ? { decidedBy: decidedBy ?? '', reason: reason ?? '' } : null,
		others: others.flatMap(({ name, assessment: other }) =>
			other ? [{ mountName: name, verdict: other.verdict, chemistry: other.chemistry }] : []
		)
	};
}
