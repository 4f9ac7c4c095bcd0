import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { receive } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeSentSheet } from '../../../../tests/support/sheets';
import { AuditEntry, CustomerMessage, OutgoingMail, Sheet, Workshop } from '../db/models';
import { stopOutbox } from '../mail/outbox';
import { findBreak } from './audit';
import { listJobs } from './jobs';
import { answerQuestion, askByLink, askOnMySheet, listMyQuestions, listQuestions } from './questions';
import { getMySheet, openSheet } from './sheet-readers';
import { withdrawSheet } from './sheets';

useTestDatabase();
afterAll(stopOutbox);

const ASKED = { askedBy: 'Ilse Tarn', question: 'Would a fan under the bonnet help?\nOr a <b>duct</b>?' };
const ANSWER = 'A duct would: about 9 degrees.';
const QUERY = { search: '', sort: 'newest', limit: 20 } as const;

/** A sent sheet whose shop and whose reader have addresses of their own. */
async function makeAskable() {
	const made = await makeSentSheet();
	const shop = `bench.${randomUUID().slice(0, 8)}@shop.example`;
	await Workshop.update({ email: shop }, { where: { id: made.crew.workshopId } });
	const reader = `reader.${randomUUID().slice(0, 8)}@travellers.example`;
	await Sheet.update({ sentTo: reader }, { where: { id: made.sheet.id } });
	return { ...made, shop, reader };
}

describe('a question asked on the sheet', () => {
	it('stands on the sheet and in the job, waits in the list of jobs, and the shop gets a letter', async () => {
		const { crew, jobId, token, shop } = await makeAskable();
		await askByLink(token, ASKED, null);
		const asked = [{ name: 'Ilse Tarn', words: ASKED.question, answers: [] }];
		expect((await openSheet(token)).questions).toMatchObject(asked);
		expect(await listQuestions(crew.installer, jobId)).toMatchObject(asked);
		expect((await listJobs(crew.installer, QUERY)).rows).toMatchObject([{ id: jobId, openQuestions: 1 }]);
		const [letter, ...more] = await receive(shop);
		expect(more).toEqual([]);
		expect(letter!.subject).toMatch(/^Ilse Tarn asks about job \d+$/);
		expect(letter!.text).toContain('> Would a fan under the bonnet help?\n> Or a <b>duct</b>?');
		expect(letter!.text).toContain(`/jobs/${jobId}#questions`);
		expect(letter!.html).toContain('help?<br>Or a &lt;b&gt;duct&lt;/b&gt;?');
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it('is answered by e-mail to whom the page was sent, on the page, by name and for good', async () => {
		const { crew, jobId, token, reader, shop } = await makeAskable();
		const [question] = await askByLink(token, ASKED, null);
		await answerQuestion(crew.engineer, question!.id, ANSWER);
		const answers = [{ name: crew.engineer.name, words: ANSWER }];
		expect((await openSheet(token)).questions).toMatchObject([{ id: question!.id, answers }]);
		expect((await listJobs(crew.installer, QUERY)).rows).toMatchObject([{ id: jobId, openQuestions: 0 }]);
		const [letter] = await receive(reader);
		expect(letter!.text).toContain(`${crew.engineer.name} of`);
		expect(letter!.text).toContain(`> ${ANSWER}`);
		expect(letter!.text).toContain('> Would a fan under the bonnet help?');
		expect(letter!.replyTo?.text ?? shop).toBe(shop);
		const where = { jobId };
		await expect(CustomerMessage.update({ body: 'Yes.' }, { where })).rejects.toThrow();
		await expect(CustomerMessage.destroy({ where })).rejects.toThrow();
	});

	it('by a customer who is signed in is theirs in the trail, and its answer goes to their own address', async () => {
		const { crew, sheet } = await makeAskable();
		const [question] = await askOnMySheet(crew.customer, sheet.id, ASKED);
		const [entry] = await AuditEntry.findAll({ where: { action: 'sheet.question', subjectId: sheet.id } });
		expect(entry).toMatchObject({ personId: crew.customer.id, detail: { questionId: question!.id } });
		await answerQuestion(crew.installer, question!.id, ANSWER);
		expect((await receive(crew.customer.email)).map(({ text }) => text)).toMatchObject([
			expect.stringContaining(ANSWER)
		]);
		expect(await listMyQuestions(crew.customer, sheet.id)).toHaveLength(1);
		expect((await getMySheet(crew.customer, sheet.id)).questions).toHaveLength(1);
	});

	it('sent twice with one form, even at the same moment, is one question and one letter', async () => {
		const { jobId, token, shop } = await makeAskable();
		const key = `form-${randomUUID()}`;
		await Promise.all([1, 2, 3].map(() => askByLink(token, ASKED, key)));
		expect(await CustomerMessage.count({ where: { jobId } })).toBe(1);
		expect(await OutgoingMail.count({ where: { recipient: shop } })).toBe(1);
		await askByLink(token, ASKED, `form-${randomUUID()}`);
		expect(await CustomerMessage.count({ where: { jobId } })).toBe(2);
	});

	it('is refused beyond ten an hour, and nothing is kept of it', async () => {
		const { jobId, token } = await makeAskable();
		for (let time = 0; time < 10; time++) await askByLink(token, ASKED, null);
		await expect(askByLink(token, ASKED, null)).rejects.toMatchObject({ code: 'too_many_requests' });
		expect(await CustomerMessage.count({ where: { jobId } })).toBe(10);
	});

	it('is refused by a withdrawn page and a link that was never made', async () => {
		const { crew, sheet, token } = await makeAskable();
		await expect(askByLink('never-made', ASKED, null)).rejects.toMatchObject({ code: 'not_found' });
		await withdrawSheet(crew.installer, sheet.id);
		await expect(askByLink(token, ASKED, null)).rejects.toMatchObject({ code: 'gone' });
	});

	it('is nobody else’s: not another workshop’s, not another customer’s', async () => {
		const { crew, jobId, sheet, token } = await makeAskable();
		const [question] = await askByLink(token, ASKED, null);
		const { installer: neighbour, customer: stranger } = await makeCrew();
		await expect(listQuestions(neighbour, jobId)).rejects.toMatchObject({ code: 'not_found' });
		const answered = answerQuestion(neighbour, question!.id, ANSWER);
		await expect(answered).rejects.toMatchObject({ code: 'not_found' });
		const other = { ...stranger, workshopId: crew.workshopId };
		for (const customer of [stranger, other]) {
			await expect(askOnMySheet(customer, sheet.id, ASKED)).rejects.toMatchObject({ code: 'not_found' });
			await expect(listMyQuestions(customer, sheet.id)).rejects.toMatchObject({ code: 'not_found' });
		}
		const byShop = askOnMySheet(crew.installer, sheet.id, ASKED);
		await expect(byShop).rejects.toMatchObject({ code: 'not_allowed' });
	});
});
