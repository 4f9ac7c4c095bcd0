import { randomUUID } from 'node:crypto';
import { afterAll, describe, expect, it } from 'vitest';
import { FITTED, makeFitted } from '../../../../tests/support/fitted';
import { receive } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, Customer, FollowUp, Job, OutgoingMail } from '../db/models';
import { env } from '../env';
import { stopOutbox } from '../mail/outbox';
import { saveFitting } from './fittings';
import { chooseReminders, openReminderChoice, stopPathOf } from './reminder-stops';
import { findReminded, remindDue } from './reminders';

useTestDatabase();
afterAll(stopOutbox);

async function makeReminded() {
	const { installer } = await makeCrew();
	const fitted = await makeFitted(installer);
	const { customerId } = (await Job.findByPk(fitted.jobId))!;
	const address = `reminded.${randomUUID().slice(0, 8)}@travellers.example`;
	await Customer.update({ email: address }, { where: { id: customerId } });
	const stop = stopPathOf(customerId).split('/').at(-1)!;
	return { ...fitted, installer, customerId, address, stop };
}

describe('a reminder', () => {
	it('arrives with the headers by which a mail program stops it in one press', async () => {
		const { address, customerId } = await makeReminded();
		await remindDue('2026-02-21');
		const [letter, ...more] = await receive(address);
		expect(more).toEqual([]);
		const url = env().ORIGIN + stopPathOf(customerId);
		const list = letter!.headers.get('list') as unknown as { unsubscribe: { url: string } };
		expect(list.unsubscribe.url).toBe(url);
		const line = letter!.headerLines.find(({ key }) => key === 'list-unsubscribe-post')?.line;
		expect(line).toBe('List-Unsubscribe-Post: List-Unsubscribe=One-Click');
		expect(letter!.text).toContain(`Stop these reminders:\n${url}`);
		expect(letter!.html).toContain('Stop these reminders');
	});

	it('goes out no more once it was stopped, not even one that was waiting, until it is wanted again', async () => {
		const { address, customerId, stop, installer, jobId } = await makeReminded();
		expect(await findReminded(installer, jobId)).toBe('customer');
		await remindDue('2026-02-21');
		expect(await OutgoingMail.count({ where: { recipient: address, state: 'waiting' } })).toBe(1);
		expect((await openReminderChoice(stop)).stoppedAt).toBeNull();
		for (let time = 0; time < 2; time++)
			expect((await chooseReminders(stop, false)).stoppedAt).not.toBeNull();
		expect(await findReminded(installer, jobId)).toBe('stopped');
		await remindDue('2026-07-24');
		expect(await receive(address)).toEqual([]);
		expect(await OutgoingMail.findAll({ where: { recipient: address } })).toMatchObject([
			{ state: 'failed', lastError: 'Not sent: the customer stopped reminders first.' }
		]);
		const where = { action: 'customer.reminders-stopped', subjectId: customerId };
		expect(await AuditEntry.count({ where })).toBe(1);
		await chooseReminders(stop, true);
		await remindDue('2027-01-24');
		expect(await receive(address)).toHaveLength(1);
	});

	it('is not stopped through a link that was never made', async () => {
		const { customerId, stop } = await makeReminded();
		for (const wrong of [`${customerId + 1}.${stop.split('.')[1]}`, `${customerId}.`, '', 'x', `${stop}0`]) {
			await expect(openReminderChoice(wrong)).rejects.toMatchObject({ code: 'not_found' });
			await expect(chooseReminders(wrong, false)).rejects.toMatchObject({ code: 'not_found' });
		}
	});

	it('comes again when the date is moved after it was sent', async () => {
		const { installer, mountId, fitting, address } = await makeReminded();
		await remindDue('2026-02-21');
		const { version } = fitting.installation!;
		await saveFitting(installer, mountId, { ...FITTED, fittedOn: '2026-02-20', version });
		const moved = await FollowUp.findByPk(fitting.followUps[0]!.id);
		expect(moved).toMatchObject({ dueOn: '2026-03-20', remindedAt: null });
		await remindDue('2026-03-13');
		const letters = await receive(address);
		expect(letters).toHaveLength(2);
		expect(letters.map(({ text }) => text).join()).toContain('on 20 March 2026 or thereabouts');
	});
});
