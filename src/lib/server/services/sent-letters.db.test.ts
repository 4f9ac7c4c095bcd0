import { afterAll, describe, expect, it } from 'vitest';
import { receive } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeSentSheet } from '../../../../tests/support/sheets';
import { AuditEntry, OutgoingMail } from '../db/models';
import { inTransaction } from '../db/transaction';
import { postLetter, stopOutbox } from '../mail/outbox';
import { askByLink } from './questions';
import { listFailedLetters, listSentLetters, sendLetterAgain } from './sent-letters';
import { withdrawSheet } from './sheets';

useTestDatabase();
afterAll(stopOutbox);

describe('the sending log of a job', () => {
	it('names every letter with kind, address and what became of it, and never what it says', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		await askByLink(token, { askedBy: 'Ilse Tarn', question: 'Why?' }, null);
		const waiting = await listSentLetters(crew.manager, jobId);
		expect(waiting.map(({ kind, state, attempts }) => ({ kind, state, attempts }))).toEqual([
			{ kind: 'question', state: 'waiting', attempts: 0 },
			{ kind: 'sheet', state: 'waiting', attempts: 0 }
		]);
		expect(JSON.stringify(waiting)).not.toContain(token);
		await receive(sheet.sentTo);
		const [, sent] = await listSentLetters(crew.manager, jobId);
		expect(sent).toMatchObject({ recipient: sheet.sentTo, state: 'sent', attempts: 1, canTryAgain: false });
		expect(sent!.sentAt).not.toBeNull();
	});

	it('lets a letter that was given up be sent again, once it is due, and it arrives', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		const [letter] = await listSentLetters(crew.manager, jobId);
		await expect(sendLetterAgain(crew.installer, letter!.id)).rejects.toMatchObject({ code: 'conflict' });
		await OutgoingMail.update(
			{ state: 'failed', attempts: 8, lastError: 'The mail server cannot be reached.' },
			{ where: { id: letter!.id } }
		);
		const [givenUp] = await listSentLetters(crew.manager, jobId);
		expect(givenUp).toMatchObject({ canTryAgain: true, lastError: 'The mail server cannot be reached.' });
		expect(await sendLetterAgain(crew.installer, letter!.id)).toMatchObject({
			state: 'waiting',
			attempts: 0
		});
		const texts = (await receive(sheet.sentTo)).map(({ text }) => text ?? '');
		expect(texts.filter((text) => text.includes(token))).toHaveLength(1);
		const where = { action: 'job.letter-tried-again', subjectId: jobId };
		expect(await AuditEntry.count({ where })).toBe(1);
	});

	it('shows the manager alone those of no job that were given up, and sends them again', async () => {
		const { crew } = await makeSentSheet();
		const recipient = `ilse.${crew.workshopId}@travellers.example`;
		const letter = {
			workshopId: crew.workshopId,
			recipient,
			subject: 'Done',
			textBody: 'Done.',
			htmlBody: '<p>Done.</p>'
		};
		await inTransaction((transaction) => postLetter({ ...letter, kind: 'erasure-refused' }, transaction));
		await inTransaction((transaction) => postLetter({ ...letter, kind: 'sign-in' }, transaction));
		await OutgoingMail.update({ state: 'failed', attempts: 80 }, { where: { recipient } });
		const [failed, ...more] = await listFailedLetters(crew.manager);
		expect(more).toEqual([]);
		expect(failed).toMatchObject({ kind: 'erasure-refused', canTryAgain: true });
		await expect(listFailedLetters(crew.installer)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(sendLetterAgain(crew.installer, failed!.id)).rejects.toMatchObject({ code: 'not_allowed' });
		await sendLetterAgain(crew.manager, failed!.id);
		expect(await receive(recipient)).toHaveLength(1);
		expect(await listFailedLetters(crew.manager)).toEqual([]);
	});

	it('does not bring back what was dropped with its sheet, nor show anything to another workshop', async () => {
		const { crew, jobId, sheet } = await makeSentSheet();
		await withdrawSheet(crew.installer, sheet.id);
		const [letter] = await listSentLetters(crew.manager, jobId);
		expect(letter).toMatchObject({ state: 'failed', canTryAgain: false });
		await expect(sendLetterAgain(crew.installer, letter!.id)).rejects.toMatchObject({ code: 'conflict' });
		const { installer: neighbour } = await makeCrew();
		await expect(listSentLetters(neighbour, jobId)).rejects.toMatchObject({ code: 'not_found' });
		await expect(sendLetterAgain(neighbour, letter!.id)).rejects.toMatchObject({ code: 'not_found' });
	});
});
