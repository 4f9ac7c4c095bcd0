import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { post } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { OutgoingMail } from '../db/models';
import { listFailedLetters, noteLetterArrived, sendLetterAgain } from '../services/sent-letters';
import { dropMails, sendDue, stopOutbox } from './outbox';
import { deliver } from './transport';

const dropAll = (recipient: string) =>
	OutgoingMail.update({ state: 'failed', lastError: 'Withdrawn.' }, { where: { recipient } });

async function dropIfAsked(recipient: string): Promise<void> {
	if (!recipient.includes('.dropped')) return;
	const letters = await OutgoingMail.findAll({ where: { recipient }, attributes: ['id'] });
	await dropMails(
		letters.map(({ id }) => id),
		'Withdrawn.'
	);
}

/** How often each address was sent a letter to its end. */
const taken = new Map<string, number>();

/** A real server of its own: knows no "nobody", is too busy for "busy", slow for "dropped", hangs up on "unsaid". */
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
	},
	onData: (stream, { envelope }, done) => {
		const { address } = envelope.rcptTo[0]!;
		stream.resume().on('end', () => {
			taken.set(address, (taken.get(address) ?? 0) + 1);
			if (address.startsWith('unsaid')) for (const each of server.connections) each._socket.destroy();
			else if (address.startsWith('full'))
				void dropIfAsked(address).then(() =>
					done(Object.assign(new Error('No room'), { responseCode: 452 }))
				);
			else done();
		});
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

/** As a process leaves it that dies between a letter's end and the answer. */
const dieAtItsEnd = (id: number) =>
	OutgoingMail.update(
		{ attempts: 1, handedOverAt: new Date(Date.now() - 1), nextAttemptAt: new Date(Date.now() - 1) },
		{ where: { id } }
	);

describe('a letter that the mail server may have', () => {
	it('is sent once and set aside when the line breaks between its end and the answer', async () => {
		const letter = await postAndSend('unsaid@travellers.example');
		expect(letter).toMatchObject({ state: 'unsure', attempts: 1, textBody: 'Hello.' });
		expect(letter.lastError).toContain('did not answer');
		await OutgoingMail.update({ nextAttemptAt: new Date(0) }, { where: { id: letter.id } });
		await sendDue();
		expect(taken.get('unsaid@travellers.example')).toBe(1);
	});

	it('is set aside, unsent, when the process died there', async () => {
		const { workshopId } = await makeCrew();
		const { id } = await post(workshopId, 'died@travellers.example');
		await dieAtItsEnd(id);
		await sendDue();
		expect((await OutgoingMail.findByPk(id))!.state).toBe('unsure');
		expect(taken.get('died@travellers.example')).toBeUndefined();
	});

	it('keeps no reader whose data was deleted', async () => {
		const { workshopId } = await makeCrew();
		const { id } = await post(workshopId, 'deleted@travellers.example');
		await OutgoingMail.update({ kind: 'erasure-granted' }, { where: { id } });
		await dieAtItsEnd(id);
		await sendDue();
		expect(await OutgoingMail.findByPk(id)).toMatchObject({
			...{ state: 'unsure', recipient: '(erased)', textBody: '' }
		});
	});

	it('is tried again by itself when the server answered its end with a no', async () => {
		expect(await postAndSend('full@travellers.example')).toMatchObject({
			...{ state: 'waiting', attempts: 1, handedOverAt: null },
			lastError: 'The mail server answered: 452 No room'
		});
	});

	it('has no words left, and never goes out empty, when it was dropped before the server’s no', async () => {
		const recipient = 'full.dropped@travellers.example';
		expect(await postAndSend(recipient)).toMatchObject({ state: 'unsure', attempts: 1, textBody: '' });
		await OutgoingMail.update({ nextAttemptAt: new Date(0) }, { where: { recipient } });
		await sendDue();
		expect(taken.get(recipient)).toBe(1);
	});

	it('goes out again, or is noted as arrived, when a person says so', async () => {
		const { workshopId, manager } = await makeCrew();
		const again = await post(workshopId, 'again@travellers.example');
		const there = await post(workshopId, 'there@travellers.example');
		for (const { id } of [again, there]) await dieAtItsEnd(id);
		await sendDue();
		expect(await listFailedLetters(manager)).toMatchObject([
			{ id: there.id, state: 'unsure', mayHaveArrived: true, canTryAgain: true },
			{ id: again.id, state: 'unsure', mayHaveArrived: true, canTryAgain: true }
		]);
		await sendLetterAgain(manager, again.id);
		expect(await noteLetterArrived(manager, there.id)).toMatchObject({ state: 'sent' });
		await expect(noteLetterArrived(manager, there.id)).rejects.toMatchObject({ code: 'conflict' });
		await sendDue();
		expect((await OutgoingMail.findByPk(again.id))!.state).toBe('sent');
		expect(taken.get('again@travellers.example')).toBe(1);
		expect(taken.get('there@travellers.example')).toBeUndefined();
	});

	it('is never handed over to its end by a process that lost it to another', async () => {
		const { workshopId } = await makeCrew();
		const { id } = await post(workshopId, 'lost@travellers.example');
		const letter = (await OutgoingMail.findByPk(id))!;
		const lost = deliver(letter, 'A shop', () => Promise.reject(new Error('Another process took it over.')));
		await expect(lost).rejects.toThrow('took it over');
		expect(taken.get('lost@travellers.example')).toBeUndefined();
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
