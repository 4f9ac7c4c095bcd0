import type { AssessmentRow } from '$lib/schemas/assessments';
import type { RecommendationView } from '$lib/schemas/recommendations';
import type { Recommendation } from '../db/models';

export function presentRecommendation(
	{
		id,
		number,
		jobId,
		againstVerdict,
		againstMaker,
		decidedBy,
		reason,
		preDrill,
		cautions,
		createdAt
	}: Recommendation,
	more: Pick<
		RecommendationView,
		'jobNumber' | 'madeOutTo' | 'customerNow' | 'recommendedBy' | 'replacedBy' | 'isFittedUnder'
	> & {
		assessment: AssessmentRow;
	}
): RecommendationView {
	return {
		...{ id, number, jobId, againstVerdict, againstMaker, decidedBy, reason },
		preDrill: preDrill ?? null,
		cautions: cautions ?? null,
		...more,
		createdAt: createdAt.toISOString()
	};
}
