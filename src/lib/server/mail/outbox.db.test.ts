import { afterAll, describe, expect, it } from 'vitest';
import { post } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { OutgoingMail } from '../db/models';
import { inTransaction } from '../db/transaction';
import { env } from '../env';
import { listKeptLetters, readKeptLetter } from './mailbox-folder';
import { postLetter, sendDue, startOutbox, stopOutbox } from './outbox';

useTestDatabase();
afterAll(stopOutbox);

async function readArrived(messageId: string) {
	const kept = await listKeptLetters(env().MAILBOX_DIR!, 500);
	return Promise.all(
		kept.filter((each) => each.messageId === messageId).map(({ file }) => readKeptLetter(file))
	);
}

describe('the outbox', () => {
	it('hands a letter to the mail server with its words as they were written', async () => {
		const { workshopId, installer } = await makeCrew();
		const text = 'Dark at 16:51, 80 °C – “too hot”.\n\nhttp://localhost/sheet/abc\n';
		const { id, messageId } = await post(workshopId, 'ilse@travellers.example', text);
		await sendDue();
		const sent = (await OutgoingMail.findByPk(id))!;
		expect(sent).toMatchObject({ state: 'sent', attempts: 1, lastError: '' });
		expect([sent.textBody, sent.htmlBody]).toEqual(['', '']);
		const [letter, ...more] = await readArrived(messageId);
		expect(more).toEqual([]);
		expect(letter!.text).toBe(text);
		expect(letter!.subject).toBe('A day at 45 °C');
		expect(letter!.to).toMatchObject({ text: 'ilse@travellers.example' });
		expect(letter!.from!.value).toMatchObject([
			{ name: installer.workshopName, address: 'soakline@localhost' }
		]);
		expect(letter!.html).toContain('<p>Hello.</p>');
	});

	it('sends a letter once, however many look for work at the same moment', async () => {
		const { workshopId } = await makeCrew();
		const { messageId } = await post(workshopId, 'once@travellers.example');
		await Promise.all([sendDue(), sendDue(), sendDue(), sendDue()]);
		expect(await readArrived(messageId)).toHaveLength(1);
	});

	it('sends all that is due in one go, however much has gathered', async () => {
		const { workshopId } = await makeCrew();
		for (let letter = 0; letter < 45; letter++) await post(workshopId, `many-${letter}@travellers.example`);
		await sendDue();
		expect(await OutgoingMail.count({ where: { workshopId, state: 'sent' } })).toBe(45);
	});

	it('begins no further letter once it is told to stop', async () => {
		const { workshopId } = await makeCrew();
		await post(workshopId, 'kept@travellers.example');
		await sendDue(() => true);
		expect(await OutgoingMail.count({ where: { workshopId, state: 'waiting' } })).toBe(1);
	});

	it('posts nothing when what the letter tells of is undone', async () => {
		const { workshopId } = await makeCrew();
		const undone = inTransaction(async (transaction) => {
			const words = { subject: 'Undone', textBody: 'Undone', htmlBody: '<p>Undone</p>' };
			await postLetter(
				{ kind: 'sheet', workshopId, recipient: 'never@travellers.example', ...words },
				transaction
			);
			throw new Error('undone');
		});
		await expect(undone).rejects.toThrow('undone');
		expect(await OutgoingMail.count({ where: { workshopId } })).toBe(0);
	});

	it('takes up by itself what a process that died had claimed, once the claim is over', async () => {
		const { workshopId } = await makeCrew();
		const { id, messageId } = await post(workshopId, 'later@travellers.example');
		await OutgoingMail.update(
			{ attempts: 1, nextAttemptAt: new Date(Date.now() + 60_000) },
			{ where: { id } }
		);
		await sendDue();
		expect(await readArrived(messageId)).toEqual([]);
		await OutgoingMail.update({ nextAttemptAt: new Date(Date.now() - 1) }, { where: { id } });
		await sendDue();
		expect(await readArrived(messageId)).toHaveLength(1);
	});

	it('sends as soon as the transaction is kept, without waiting for its next look', async () => {
		const { workshopId } = await makeCrew();
		startOutbox();
		const { id } = await post(workshopId, 'soon@travellers.example');
		await expect.poll(async () => (await OutgoingMail.findByPk(id))!.state, { timeout: 20_000 }).toBe('sent');
		await stopOutbox();
	});
});
