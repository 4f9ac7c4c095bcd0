import { QueryTypes, type Transaction } from 'sequelize';
import type { JobStage } from '$lib/schemas/jobs';
import { connection } from '../db/connection';
import { Assessment, type Job } from '../db/models';

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

/** The mount of each job's newest recommendation, by job. */
async function recommendedMounts(jobIds: number[]): Promise<Map<number, number>> {
	const rows = await connection().query<{ jobId: number; mountId: number }>(
		`SELECT r.job_id AS jobId, a.mount_id AS mountId
			FROM recommendations r JOIN assessments a ON a.id = r.assessment_id
			WHERE r.id IN (SELECT MAX(id) FROM recommendations WHERE job_id IN (:jobIds) GROUP BY job_id)`,
		{ replacements: { jobIds }, type: QueryTypes.SELECT }
	);
	return new Map(rows.map(({ jobId, mountId }) => [jobId, mountId]));
}

/** The newest assessment of each mount that stands in some jobs. */
async function newestStanding(jobIds: number[]): Promise<Assessment[]> {
	const newest = await connection().query<{ id: number }>(
		`SELECT MAX(a.id) AS id FROM assessments a JOIN mounts m ON m.id = a.mount_id AND m.removed_at IS NULL
			WHERE a.job_id IN (:jobIds) GROUP BY a.mount_id`,
		{ replacements: { jobIds }, type: QueryTypes.SELECT }
	);
	return Assessment.findAll({
		where: { id: newest.map(({ id }) => id) },
		attributes: ['id', 'jobId', 'mountId', 'verdict', 'headroomK', 'chemistry']
	});
}

/** By job the newest assessment of the recommended mount; without one, that of the mount with the most room. */
async function findSpeaking(jobIds: number[]): Promise<Map<number, Assessment>> {
	const [newest, recommended] = await Promise.all([newestStanding(jobIds), recommendedMounts(jobIds)]);
	const speaking = new Map<number, Assessment>();
	for (const each of newest.sort((a, b) => b.headroomK - a.headroomK)) {
		if (each.mountId === recommended.get(each.jobId)) speaking.set(each.jobId, each);
		else if (!speaking.has(each.jobId)) speaking.set(each.jobId, each);
	}
	return speaking;
}

/** Lets the job say what its assessments say, inside the transaction that changed them. */
export async function updateJobOutcome(
	job: Job,
	transaction: Transaction,
	stage: JobStage | null = null
): Promise<void> {
	const speaking = (await findSpeaking([job.id])).get(job.id);
	const { verdict = null, headroomK = null } = speaking ?? {};
	const assessed = speaking ? { assessedChemistry: speaking.chemistry } : {};
	const reached = stage ?? (job.stage === 'survey' && speaking ? 'assessed' : job.stage);
	await job.update({ verdict, headroomK, ...assessed, stage: reached }, { transaction });
}

/**
 * The same for several jobs at once, after their assessments were made again: what they have come to stays, and so does
 * their version, since nobody edited them.
 */
export async function refreshOutcomes(jobIds: number[], transaction: Transaction): Promise<void> {
	const speaking = [...(await findSpeaking(jobIds)).values()];
	if (speaking.length === 0) return;
	const rows = speaking.map(({ jobId, verdict, headroomK, chemistry }) => [
		jobId,
		verdict,
		headroomK,
		chemistry
	]);
	const values = rows
		.map(() => 'SELECT ? AS id, ? AS verdict, ? AS headroom_k, ? AS chemistry')
		.join(' UNION ALL ');
	await connection().query(
		`UPDATE jobs j JOIN (${values}) s ON s.id = j.id
			SET j.verdict = s.verdict, j.headroom_k = s.headroom_k, j.assessed_chemistry = s.chemistry`,
		{ replacements: rows.flat(), transaction }
	);
}
