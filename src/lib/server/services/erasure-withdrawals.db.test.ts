import { afterAll, describe, expect, it } from 'vitest';
import { makeKnownCustomer } from '../../../../tests/support/known-customer';
import { receive } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, Customer, CustomerMessage, Erasure } from '../db/models';
import { stopOutbox } from '../mail/outbox';
import { askErasure, decideErasure, getMyErasure, listErasures, withdrawErasure } from './erasures';
import { listJobs } from './jobs';
import { answerQuestion, askByLink, listQuestions } from './questions';
import { countWaitingErasures } from './waiting-erasures';

useTestDatabase();
afterAll(stopOutbox);

const grant = (version: number) => ({ decision: 'grant' as const, reason: '', version });
const QUERY = { search: '', sort: 'newest', limit: 20 } as const;

describe('a request for deletion that its customer takes back', () => {
	it('waits no longer, is on record, and the shop gets a letter', async () => {
		const { customer, manager } = await makeCrew();
		expect(await askErasure(customer)).toMatchObject({ state: 'asked', canWithdraw: true });
		const [request] = await listErasures(manager);
		expect(await withdrawErasure(customer)).toMatchObject({ state: 'withdrawn', canWithdraw: false });
		expect(await getMyErasure(customer)).toMatchObject({ state: 'withdrawn' });
		expect(await countWaitingErasures(manager)).toMatchObject({ count: 0 });
		expect(await listErasures(manager)).toMatchObject([{ id: request!.id, state: 'withdrawn' }]);
		const action = 'customer.erasure-withdrawn';
		const entries = await AuditEntry.findAll({ where: { action, subjectId: customer.customerId! } });
		expect(entries).toMatchObject([{ personId: customer.id, detail: { erasureId: request!.id } }]);
		const subjects = (await receive(manager.email)).map(({ subject }) => subject);
		expect(subjects).toContain('A customer takes back a request for deletion');
	});

	it('can be decided by nobody, and asked anew', async () => {
		const { customer, manager } = await makeCrew();
		await askErasure(customer);
		const [request] = await listErasures(manager);
		await withdrawErasure(customer);
		for (const version of [request!.version, request!.version + 1]) {
			await expect(decideErasure(manager, request!.id, grant(version))).rejects.toMatchObject({
				code: 'conflict',
				message: 'The customer has taken this request back.'
			});
		}
		expect((await Customer.findByPk(customer.customerId!))!.name).not.toBe('(erased)');
		expect(await askErasure(customer)).toMatchObject({ state: 'asked' });
	});

	it('is refused where nothing of theirs waits, and to everybody else', async () => {
		const { customer, manager, installer, engineer } = await makeCrew();
		const { workshopId, customerId } = customer;
		await expect(withdrawErasure(customer)).rejects.toMatchObject({
			code: 'conflict',
			message: expect.stringContaining('cannot be undone') as string
		});
		await Erasure.create({ workshopId, customerId: customerId! });
		expect(await getMyErasure(customer)).toMatchObject({ state: 'asked', canWithdraw: false });
		await expect(withdrawErasure(customer)).rejects.toMatchObject({ code: 'conflict' });
		for (const person of [manager, installer, engineer])
			await expect(withdrawErasure(person)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});

describe('a question of a customer whose data was deleted', () => {
	it('waits for nobody and cannot be answered', async () => {
		const { crew, customer, jobId, token } = await makeKnownCustomer();
		const asked = await askByLink(token, { askedBy: customer.name, question: 'And in the canopy?' }, null);
		const { id } = asked.at(-1)!;
		expect((await listJobs(crew.installer, QUERY)).rows).toMatchObject([{ id: jobId, openQuestions: 1 }]);
		await askErasure(customer);
		const [request] = await listErasures(crew.manager);
		await decideErasure(crew.manager, request!.id, grant(request!.version));
		expect((await listJobs(crew.installer, QUERY)).rows).toMatchObject([{ id: jobId, openQuestions: 0 }]);
		const after = await listQuestions(crew.installer, jobId);
		expect(after.map(({ takesAnswers }) => takesAnswers)).toEqual(after.map(() => false));
		await expect(answerQuestion(crew.installer, id, 'It would.')).rejects.toMatchObject({
			code: 'conflict',
			message: expect.stringContaining('nobody is there to be answered') as string
		});
		expect(await CustomerMessage.count({ where: { questionId: id } })).toBe(0);
	}, 60_000);
});
