import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import type { SheetSource } from '../presenters/sheet-content';
import { lookElsewhere } from './outlook-reports';
import { getOutlook, withHottestDays } from './outlooks';
import { touringOf } from './touring-year';
import { getRecommendationDocument, newestRecommendation } from './recommendations';

const SUPERSEDED = 'There is a newer recommendation for this job: send that one.';

/** Collects what a sheet is written from, and waits for the outlook while that is worked out. Only the newest recommendation of a job may go to its customer. */
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
	const outlook = await withHottestDays(assessment.id, await getOutlook(person, assessment.id));
	const { elsewhere } = await lookElsewhere(person, others);
	return {
		...{ jobId, workshop },
		beside: {
			outlook,
			year: touringOf(assessment.inputs),
			elsewhere: elsewhere.map(({ name, life }) => ({ label: name, life }))
		},
		cautions: recommendation.cautions,
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
