import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { post } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { OutgoingMail } from '../db/models';
import { sendDue, stopOutbox } from './outbox';

const dropAll = (recipient: string) =>
	OutgoingMail.update({ state: 'failed', lastError: 'Withdrawn.' }, { where: { recipient } });

/** A real server of its own that knows nobody called "nobody", is too busy for "busy", and slow for "dropped". */
const server = new SMTPServer({
	authOptional: true,
	disabledCommands: ['AUTH', 'STARTTLS'],
	onRcptTo: ({ address }, _session, done) => {
		if (address.startsWith('nobody'))
			done(Object.assign(new Error('No such mailbox'), { responseCode: 550 }));
		else if (address.startsWith('busy')) done(Object.assign(new Error('Try later'), { responseCode: 451 }));
		else if (address.startsWith('dropped'))
			void dropAll(address).then(() => done(Object.assign(new Error('Try later'), { responseCode: 451 })));
		else done();
	}
});

beforeAll(async () => {
	await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
	process.env.SMTP_URL = `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`;
});
useTestDatabase();
afterAll(stopOutbox);
afterAll(() => new Promise<void>((resolve) => server.close(resolve)));

async function postAndSend(recipient: string, attemptsBefore = 0): Promise<OutgoingMail> {
	const { workshopId } = await makeCrew();
	const { id } = await post(workshopId, recipient);
	await OutgoingMail.update({ attempts: attemptsBefore }, { where: { id } });
	await sendDue();
	return (await OutgoingMail.findByPk(id))!;
}

describe('a letter that the mail server does not take', () => {
	it('is given up at once when the refusal is final, with the server’s own words', async () => {
		expect(await postAndSend('nobody@travellers.example')).toMatchObject({
			...{ state: 'failed', attempts: 1 },
			lastError: 'The mail server answered: 550 No such mailbox'
		});
	});

	it('waits for its next try when the refusal is for now', async () => {
		const letter = await postAndSend('busy@travellers.example');
		expect(letter).toMatchObject({
			...{ state: 'waiting', attempts: 1 },
			lastError: 'The mail server answered: 451 Try later'
		});
		expect(letter.nextAttemptAt.getTime()).toBeGreaterThan(Date.now());
	});

	it('is not put back when somebody dropped it while it was tried', async () => {
		const mail = await postAndSend('dropped@travellers.example');
		expect(mail).toMatchObject({ state: 'failed', lastError: 'Withdrawn.' });
	});

	it('is tried for three days, and then given up', async () => {
		expect(await postAndSend('busy@travellers.example', 78)).toMatchObject({
			state: 'waiting',
			attempts: 79
		});
		expect(await postAndSend('busy@travellers.example', 79)).toMatchObject({ state: 'failed', attempts: 80 });
	});

	it('keeps no other letter from going out', async () => {
		const { workshopId } = await makeCrew();
		await post(workshopId, 'nobody@travellers.example');
		const { id } = await post(workshopId, 'somebody@travellers.example');
		await sendDue();
		expect((await OutgoingMail.findByPk(id))!.state).toBe('sent');
	});
});

describe('a mail server that is not there', () => {
	it('leaves the letter waiting and says so in words', async () => {
		await stopOutbox();
		await new Promise<void>((resolve) => server.close(resolve));
		expect(await postAndSend('somebody@travellers.example')).toMatchObject({
			...{ state: 'waiting', attempts: 1 },
			lastError: 'The mail server cannot be reached.'
		});
	});
});
