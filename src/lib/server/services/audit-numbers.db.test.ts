import { expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { auditQuerySchema } from '$lib/schemas/audit';
import { Job } from '../db/models';
import { inTransaction } from '../db/transaction';
import { recordBy } from './audit';
import { writeAuditCsv } from './audit-csv';
import { listAudit } from './audit-list';
import { draftBook } from './book-changes';
import { listBooks } from './books';

useTestDatabase();

/** The second of two workshops, so that numbers of its own and those that rows are kept under differ. */
async function makeSecondShop() {
	await makeAssessableJob((await makeCrew()).installer);
	const crew = await makeCrew();
	const { jobId } = await makeAssessableJob(crew.installer);
	const [first] = await listBooks(crew.engineer);
	const begin = (name: string) => draftBook(crew.engineer, { fromBookId: first!.id, name, note: '' });
	const [second, third] = [await begin('Second'), await begin('Third')];
	expect(third.id).not.toBe(third.number);
	return { crew, jobId, books: [first!, second, third] };
}

it('the trail names books and jobs by the workshop’s own number, finds them by it, and writes it in its CSV', async () => {
	const { crew, jobId, books } = await makeSecondShop();
	const look = async (words: string) =>
		(await listAudit(crew.manager, auditQuerySchema.parse({ words }))).rows;
	const third = books[2]!;
	const rows = await look('book 3');
	expect(rows).toMatchObject([
		{
			action: 'book.drafted',
			subject: 'book',
			subjectId: third.id,
			subjectNumber: 3,
			href: `/books/${third.id}`
		}
	]);
	expect(await look(`book ${third.id}`)).toEqual([]);
	const { number } = (await Job.findByPk(jobId))!;
	await inTransaction((transaction) =>
		recordBy(crew.manager, 'job.answer', { type: 'job', id: jobId }, transaction)
	);
	expect(await look(`Job ${number} answer`)).toMatchObject([
		{ subject: 'job', subjectId: jobId, subjectNumber: number }
	]);
	expect((await look('drafted 2')).map(({ subjectNumber }) => subjectNumber)).toContain(2);
	const lines: string[] = [];
	for await (const part of writeAuditCsv(crew.manager, auditQuerySchema.parse({ words: 'book 3' })))
		lines.push(part);
	expect(lines.join('')).toMatch(/book,3,/);
});
