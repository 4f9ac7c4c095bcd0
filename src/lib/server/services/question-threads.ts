import { QueryTypes } from 'sequelize';
import type { Question } from '$lib/schemas/questions';
import { connection } from '../db/connection';
import { CustomerMessage, Erasure, Job } from '../db/models';
import { presentQuestions } from '../presenters/questions';

/** Whether the customer of a job had everything deleted: then nobody is there to be answered. */
export async function isCustomerErased(jobId: number): Promise<boolean> {
	const job = await Job.findByPk(jobId, { attributes: ['customerId'] });
	return (
		job !== null && (await Erasure.count({ where: { customerId: job.customerId, state: 'granted' } })) > 0
	);
}

/** What was asked about a job and what the shop answered, oldest first. */
export async function readThread(jobId: number): Promise<Question[]> {
	const messages = await CustomerMessage.findAll({ where: { jobId }, order: [['id', 'ASC']] });
	return presentQuestions(messages, messages.length > 0 && (await isCustomerErased(jobId)));
}

/** How many questions of each of these jobs wait for an answer. */
export async function countOpenQuestions(jobIds: readonly number[]): Promise<Map<number, number>> {
	if (jobIds.length === 0) return new Map();
	const rows = await connection().query<{ jobId: number; open: number }>(
		`SELECT job_id AS jobId, COUNT(*) AS open FROM customer_messages AS asked
		 WHERE job_id IN (:jobIds) AND question_id IS NULL
			AND NOT EXISTS (SELECT 1 FROM customer_messages WHERE question_id = asked.id)
			AND NOT EXISTS (SELECT 1 FROM erasures JOIN jobs ON jobs.customer_id = erasures.customer_id
				WHERE jobs.id = asked.job_id AND erasures.state = 'granted')
		 GROUP BY job_id`,
		{ replacements: { jobIds: [...jobIds] }, type: QueryTypes.SELECT }
	);
	return new Map(rows.map(({ jobId, open }) => [jobId, Number(open)]));
}
