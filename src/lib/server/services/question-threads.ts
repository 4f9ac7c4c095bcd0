import { QueryTypes } from 'sequelize';
import type { Question } from '$lib/schemas/questions';
import { connection } from '../db/connection';
import { CustomerMessage } from '../db/models';
import { presentQuestions } from '../presenters/questions';

/** What was asked about a job and what the shop answered, oldest first. */
export async function readThread(jobId: number): Promise<Question[]> {
	return presentQuestions(await CustomerMessage.findAll({ where: { jobId }, order: [['id', 'ASC']] }));
}

/** How many questions of each of these jobs wait for an answer. */
export async function countOpenQuestions(jobIds: readonly number[]): Promise<Map<number, number>> {
	if (jobIds.length === 0) return new Map();
	const rows = await connection().query<{ jobId: number; open: number }>(
		`SELECT job_id AS jobId, COUNT(*) AS open FROM customer_messages AS asked
		 WHERE job_id IN (:jobIds) AND question_id IS NULL
			AND NOT EXISTS (SELECT 1 FROM customer_messages WHERE question_id = asked.id)
		 GROUP BY job_id`,
		{ replacements: { jobIds: [...jobIds] }, type: QueryTypes.SELECT }
	);
	return new Map(rows.map(({ jobId, open }) => [jobId, Number(open)]));
}
