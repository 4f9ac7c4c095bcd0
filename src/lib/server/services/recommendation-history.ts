import { Op } from 'sequelize';
import type { RecommendationView } from '$lib/schemas/recommendations';
import { Assessment, Installation, Person, Recommendation } from '../db/models';

/** What is kept under the agreement of a fitting: the newest recommendation that was there by then. */
export async function findFittedUnder({
	assessmentId,
	workshopId,
	createdAt
}: Pick<Installation, 'assessmentId' | 'workshopId' | 'createdAt'>): Promise<Recommendation | null> {
	const made = await Recommendation.findAll({ where: { assessmentId, workshopId }, order: [['id', 'ASC']] });
	return made.filter((each) => each.createdAt <= createdAt).at(-1) ?? made[0] ?? null;
}

/** The newest recommendation of the same mount, where it came later. */
async function findNewer({ id, jobId }: Recommendation, mountId: number): Promise<Recommendation | null> {
	const assessments = await Assessment.findAll({ where: { jobId, mountId }, attributes: ['id'] });
	return Recommendation.findOne({
		where: { id: { [Op.gt]: id }, assessmentId: assessments.map((each) => each.id) },
		order: [['id', 'DESC']]
	});
}

/** What became of a recommendation after it was made. */
export async function findAftermath(
	recommendation: Recommendation,
	mountId: number
): Promise<Pick<RecommendationView, 'replacedBy' | 'isFittedUnder'>> {
	const newer = await findNewer(recommendation, mountId);
	const author = newer && (await Person.findByPk(newer.createdBy));
	const installation = await Installation.findOne({ where: { mountId } });
	const under = installation && (await findFittedUnder(installation));
	return {
		replacedBy: newer && {
			id: newer.id,
			recommendedBy: author?.name ?? '',
			createdAt: newer.createdAt.toISOString()
		},
		isFittedUnder: under?.id === recommendation.id
	};
}
