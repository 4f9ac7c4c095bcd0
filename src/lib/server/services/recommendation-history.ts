import type { RecommendationView } from '$lib/schemas/recommendations';
import { Assessment, type Customer, Installation, type Mount, Person, Recommendation } from '../db/models';

/** The recommendation that a fitting is held against. */
export const findFittedUnder = async ({
	recommendationId
}: Pick<Installation, 'recommendationId'>): Promise<Recommendation | null> =>
	recommendationId === null ? null : Recommendation.findByPk(recommendationId);

/** The recommendations of one mount, the newest first. */
export async function listOfMount({
	id: mountId,
	jobId,
	workshopId
}: Pick<Mount, 'id' | 'jobId' | 'workshopId'>): Promise<Recommendation[]> {
	const assessments = await Assessment.findAll({ where: { jobId, mountId }, attributes: ['id'] });
	return Recommendation.findAll({
		where: { jobId, workshopId, assessmentId: assessments.map(({ id }) => id) },
		order: [['id', 'DESC']]
	});
}

/** Whom a recommendation is made out to, and what that customer is called since, where it is another name. */
export async function findAddressee(
	{ madeOutTo: kept, assessmentId }: Recommendation,
	{ name }: Customer
): Promise<Pick<RecommendationView, 'madeOutTo' | 'customerNow'>> {
	const madeOutTo =
		kept ?? (await Assessment.findByPk(assessmentId, { attributes: ['inputs'] }))!.inputs.customerName;
	return { madeOutTo, customerNow: name === madeOutTo ? null : name };
}

/** What became of a recommendation after it was made. */
export async function findAftermath(
	recommendation: Recommendation,
	mountId: number
): Promise<Pick<RecommendationView, 'replacedBy' | 'isFittedUnder'>> {
	const { id, jobId, workshopId } = recommendation;
	const [newest] = await listOfMount({ id: mountId, jobId, workshopId });
	const newer = newest && newest.id > id ? newest : null;
	const author = newer && (await Person.findByPk(newer.createdBy));
	const installation = await Installation.findOne({ where: { mountId } });
	const under = installation && (await findFittedUnder(installation));
	return {
		replacedBy: newer && {
			...{ id: newer.id, number: newer.number },
			recommendedBy: author?.name ?? '',
			createdAt: newer.createdAt.toISOString()
		},
		isFittedUnder: under?.id === recommendation.id
	};
}
