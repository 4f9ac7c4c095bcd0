import type { Transaction } from 'sequelize';
import type { JobStage } from '$lib/schemas/jobs';
import { Assessment, Mount, Recommendation, type Job } from '../db/models';

/** Everything of an assessment but its two large texts. */
export const WITHOUT_TEXTS = { exclude: ['inputs', 'result'] };

/** The newest assessment of each mount, by mount. */
export async function newestByMount(jobId: number, until?: Date): Promise<Map<number, Assessment>> {
	const assessments = await Assessment.findAll({
		where: { jobId },
		attributes: WITHOUT_TEXTS,
		order: [['id', 'ASC']]
	});
	return new Map(
		assessments
			.filter(({ createdAt }) => !until || createdAt <= until)
			.map((assessment) => [assessment.mountId, assessment])
	);
}

/** The newest assessment of the recommended mount; without one, that of the mount with the most room. */
async function findSpeaking(jobId: number): Promise<Assessment | undefined> {
	const standing = await Mount.findAll({ where: { jobId, removedAt: null }, attributes: ['id'] });
	const ids = new Set(standing.map(({ id }) => id));
	const newest = [...(await newestByMount(jobId)).values()].filter(({ mountId }) => ids.has(mountId));
	const recommendation = await Recommendation.findOne({ where: { jobId }, order: [['id', 'DESC']] });
	const chosen =
		recommendation && (await Assessment.findByPk(recommendation.assessmentId, { attributes: ['mountId'] }));
	const recommended = newest.find(({ mountId }) => mountId === chosen?.mountId);
	return recommended ?? newest.sort((a, b) => b.headroomK - a.headroomK)[0];
}

/** Lets the job say what its assessments say, inside the transaction that changed them. */
export async function updateJobOutcome(
	job: Job,
	transaction: Transaction,
	stage: JobStage | null = null
): Promise<void> {
	const speaking = await findSpeaking(job.id);
	const { verdict = null, headroomK = null } = speaking ?? {};
	const assessed = speaking ? { assessedChemistry: speaking.chemistry } : {};
	const reached = stage ?? (job.stage === 'survey' && speaking ? 'assessed' : job.stage);
	await job.update({ verdict, headroomK, ...assessed, stage: reached }, { transaction });
}
