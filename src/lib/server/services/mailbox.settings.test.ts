import { readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { makeKnownCustomer } from '../../../../tests/support/known-customer';
import { post } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeSentSheet } from '../../../../tests/support/sheets';
import type { ErasureView } from '$lib/schemas/erasures';
import type { SignedInPerson } from '$lib/schemas/people';
import { mailSignInLink } from '../auth/mailed-link';
import { Customer, OutgoingMail, SecondFactor } from '../db/models';
import { env } from '../env';
import { listKeptLetters } from '../mail/mailbox-folder';
import { sendDue } from '../mail/outbox';
import { clearExpired } from './clear-expired';
import { askErasure, decideErasure, listErasures } from './erasures';
import { invite } from './invitations';
import { getLetter, listLetters } from './mailbox';
import { changeRole } from './people';
import { beginSetUp, resetFactor } from './second-factor';

process.env.SOAKLINE_DEMO = '1';
useTestDatabase();

describe('the local mailbox of a demonstration', () => {
	it('lists the letters of the own workshop and opens one, its link a link', async () => {
		const { crew, sheet, token } = await makeSentSheet();
		await sendDue();
		const [row, ...more] = await listLetters(crew.installer);
		expect(more).toEqual([]);
		expect(row).toMatchObject({ recipient: sheet.sentTo });
		const letter = await getLetter(crew.installer, row!.messageId);
		expect(letter.lines).toContainEqual({ kind: 'link', href: `${env().ORIGIN}/sheet/${token}` });
		expect(letter.subject).toBe(row!.subject);
	});

	it('lists once what was sent again, for it has the same message id', async () => {
		const { installer, workshopId } = await makeCrew();
		const { id, messageId } = await post(workshopId, installer.email);
		await sendDue();
		await OutgoingMail.update({ state: 'waiting', nextAttemptAt: new Date(0) }, { where: { id } });
		await sendDue();
		const kept = await listKeptLetters(env().MAILBOX_DIR!, 500);
		expect(kept.filter((each) => each.messageId === messageId)).toHaveLength(2);
		expect(await listLetters(installer)).toHaveLength(1);
	});

	it('shows another workshop nothing of it', async () => {
		const { crew } = await makeSentSheet();
		await sendDue();
		const [row] = await listLetters(crew.installer);
		const { manager: stranger } = await makeCrew();
		expect(await listLetters(stranger)).toEqual([]);
		await expect(getLetter(stranger, row!.messageId)).rejects.toMatchObject({ code: 'not_found' });
	});

	it('is closed to customers', async () => {
		const { customer } = await makeCrew();
		await expect(listLetters(customer)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(getLetter(customer, 'any')).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('makes no link of an address that leads elsewhere', async () => {
		const { installer, workshopId } = await makeCrew();
		await post(workshopId, installer.email, 'See\n\nhttps://elsewhere.example/sheet/abc\n');
		await sendDue();
		const [row] = await listLetters(installer);
		expect((await getLetter(installer, row!.messageId)).lines).toEqual([
			{ kind: 'words', text: 'See' },
			{ kind: 'words', text: 'https://elsewhere.example/sheet/abc' }
		]);
	});

	it('passes over files that are no letters of ours', async () => {
		const { installer, workshopId } = await makeCrew();
		const folder = env().MAILBOX_DIR!;
		await writeFile(join(folder, '9999-empty.eml'), '');
		await writeFile(join(folder, '9999-broken.eml'), Buffer.from([0, 255, 13, 10, 13, 10, 1]));
		await writeFile(join(folder, '9999-foreign.eml'), 'Message-ID: <made-up@elsewhere.example>\r\n\r\nHi');
		await post(workshopId, installer.email);
		await sendDue();
		expect(await listLetters(installer)).toHaveLength(1);
	});

	it('shows the manager what the shop sends of no job, and others none of it', async () => {
		const { manager, installer, engineer, customer } = await makeCrew();
		await Customer.update({ email: customer.email }, { where: { id: customer.customerId! } });
		await changeRole(manager, engineer.id, { role: 'manager', version: 0 });
		await askErasure(customer);
		const [request] = await listErasures(manager);
		expect(request!.letter).toBeNull();
		const refusal = { decision: 'refuse', reason: 'Under warranty.', version: request!.version } as const;
		expect(await decideErasure(manager, request!.id, refusal)).toMatchObject({
			letter: { state: 'waiting' }
		});
		await invite(manager, { name: 'Wren', email: `wren-${manager.id}@shop.example`, role: 'installer' });
		await beginSetUp(installer);
		await SecondFactor.update({ confirmedAt: new Date() }, { where: { personId: installer.id } });
		await resetFactor(manager, installer.id);
		await mailSignInLink(customer.email, '127.0.0.1');
		await sendDue();
		const subjectsFor = async (person: SignedInPerson) =>
			(await listLetters(person)).map(({ recipient, subject }) => `${subject} > ${recipient}`).sort();
		const all = await subjectsFor({ ...engineer, role: 'manager' });
		expect(all).toEqual([
			expect.stringMatching(/^A customer asks that their data be deleted > /),
			expect.stringMatching(/^Join .* > wren-/),
			expect.stringMatching(/^Your request for deletion: .* > customer-/),
			expect.stringContaining(`> ${installer.email}`)
		]);
		expect(await subjectsFor(installer)).toEqual([expect.stringContaining(`> ${installer.email}`)]);
		expect((await listErasures(manager))[0]).toMatchObject({ letter: { state: 'sent' } });
	});

	it('loses what was written to and of an erased person, and shows nothing of it that comes late', async () => {
		const { crew, customer, known, jobId } = await makeKnownCustomer();
		await askErasure(customer);
		await sendDue();
		const letters = await OutgoingMail.findAll({ where: { jobId } });
		const ids = letters.map(({ messageId }) => messageId);
		const folder = env().MAILBOX_DIR!;
		const findTheirs = async () =>
			(await listKeptLetters(folder, 500)).filter(({ messageId }) => ids.includes(messageId));
		const files = (await findTheirs()).map(({ file }) => file);
		const kinds = new Set(letters.map(({ kind }) => kind));
		expect([...kinds].sort()).toEqual(['answer', 'question', 'sheet']);
		expect(files).toHaveLength(letters.length);
		const texts = await Promise.all(files.map((file) => readFile(file)));
		const [{ id, version }] = (await listErasures(crew.manager)) as [ErasureView];
		await decideErasure(crew.manager, id, { decision: 'grant', reason: '', version });
		expect(await findTheirs()).toEqual([]);
		await Promise.all(files.map((file, at) => writeFile(file, texts[at]!)));
		await sendDue();
		const shown = await listLetters(crew.manager);
		expect(shown.map(({ subject }) => subject).sort()).toEqual([
			'A customer asks that their data be deleted',
			`Your data was deleted: ${crew.manager.workshopName}`
		]);
		expect(JSON.stringify(shown)).not.toContain(known.email);
		expect(await findTheirs()).toHaveLength(files.length);
		const others = async () =>
			(await listKeptLetters(folder, 500)).filter(({ messageId }) => !ids.includes(messageId)).length;
		const before = await others();
		expect(await clearExpired()).toBeGreaterThanOrEqual(files.length);
		expect(await findTheirs()).toEqual([]);
		expect(await others()).toBe(before);
	}, 60_000);

	it('keeps a letter without a sheet, such as a link to sign in, for its reader alone', async () => {
		const { installer, manager, workshopId } = await makeCrew();
		await post(workshopId, manager.email);
		await sendDue();
		const [row] = await listLetters(manager);
		expect(row).toBeDefined();
		expect(await listLetters(installer)).toEqual([]);
		await expect(getLetter(installer, row!.messageId)).rejects.toMatchObject({ code: 'not_found' });
	});
});
