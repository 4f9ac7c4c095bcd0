import type { SignedInPerson } from '$lib/schemas/people';
import { isUndecided } from '$lib/schemas/recommendations';
import { AppError } from '../errors';
import type { SheetSource } from '../presenters/sheet-content';
import { lookElsewhere } from './outlook-reports';
import { getOutlook, withHottestDays } from './outlooks';
import { touringOf } from './touring-year';
import { getRecommendationDocument, newestRecommendation } from './recommendations';

const UNDECIDED =
	'The battery’s maker does not allow it under the bonnet, and this recommendation names nobody who decided to go ahead all the same. Recommend the mount again, with who decided and why.';
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
	const { jobId, decidedBy, reason, preDrill, madeOutTo, customerNow } = recommendation;
	const newest = await newestRecommendation(person, jobId);
	if (newest?.id !== recommendationId)
		throw new AppError('conflict', SUPERSEDED, [{ path: 'recommendationId', message: SUPERSEDED }]);
	if (isUndecided(recommendation, assessment))
		throw new AppError('conflict', UNDECIDED, [{ path: 'recommendationId', message: UNDECIDED }]);
	const outlook = await withHottestDays(assessment.id, await getOutlook(person, assessment.id));
	const { elsewhere } = await lookElsewhere(person, others);
	return {
		...{ jobId, workshop, preDrill },
		customerName: customerNow ?? madeOutTo,
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
		override: decidedBy === null ? null : { decidedBy, reason: reason ?? '' },
		others: others.flatMap(({ name, assessment: other }) =>
			other ? [{ mountName: name, verdict: other.verdict, chemistry: other.chemistry }] : []
		)
	};
}
