import { QueryTypes } from 'sequelize';
import { afterAll, describe, expect, it } from 'vitest';
import { andUndo, makeKnownCustomer } from '../../../../tests/support/known-customer';
import { contentIdOf, listKept } from '../../../../tests/support/mount-files';
import { asIncoming, telephonePhoto } from '../../../../tests/support/pictures';
import { receive } from '../../../../tests/support/letters';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { openSession, personOfSession } from '../auth/sessions';
import { connection } from '../db/connection';
import {
	Acknowledgement,
	Assessment,
	AuditEntry,
	Customer,
	Erasure,
	FieldNote,
	FieldNoteStrike,
	Installation,
	Mount,
	OutgoingMail,
	Recommendation,
	StoredFile,
	Workshop
} from '../db/models';
import { env } from '../env';
import { listKeptLetters, readKeptLetter } from '../mail/mailbox-folder';
import { sendDue, stopOutbox } from '../mail/outbox';
import { reproduceAssessment } from './assessments';
import { findBreak } from './audit';
import { askErasure, decideErasure, getMyErasure, listErasures } from './erasures';
import { clearFiles } from './clear-files';
import { addMonths, today } from './days';
import { addFile } from './files';
import { askForAged, getRetention, saveRetention } from './retention';
import { listQuestions } from './questions';
import { findReminded } from './reminders';
import { openSheet } from './sheet-readers';
import { countWaitingErasures, findWaitingErasure } from './waiting-erasures';

useTestDatabase();
afterAll(stopOutbox);

/** Every column of every table that holds text, and in which of them something stands. */
async function findEverywhere(words: string): Promise<string[]> {
	const columns = await connection().query<{ inTable: string; name: string }>(
		`SELECT table_name AS inTable, column_name AS name FROM information_schema.columns
		 WHERE table_schema = DATABASE() AND data_type IN ('char', 'varchar', 'tinytext', 'text', 'mediumtext', 'longtext', 'json')`,
		{ type: QueryTypes.SELECT }
	);
	expect(columns.length).toBeGreaterThan(80);
	const found: string[] = [];
	for (const { inTable, name } of columns) {
		const [row] = await connection().query<{ rows: number }>(
			`SELECT COUNT(*) AS \`rows\` FROM \`${inTable}\` WHERE LOCATE(:words, \`${name}\`) > 0`,
			{ replacements: { words }, type: QueryTypes.SELECT }
		);
		if (Number(row!.rows) > 0) found.push(`${inTable}.${name}`);
	}
	return found;
}

async function makeRequest() {
	const made = await makeKnownCustomer();
	await askErasure(made.customer);
	const [request] = await listErasures(made.crew.manager);
	return { ...made, request: request! };
}

const GRANT = (version: number) => ({ decision: 'grant' as const, reason: '', version });

describe('a request for deletion', () => {
	it('waits for a manager, who gets a letter, and is one however often it is asked', async () => {
		const { crew, customer, request } = await makeRequest();
		await askErasure(customer);
		expect(await listErasures(crew.manager)).toHaveLength(1);
		expect(request).toMatchObject({ customerName: customer.name, state: 'asked', vehicles: 1 });
		expect(await getMyErasure(customer)).toMatchObject({ state: 'asked' });
		const [letter, ...more] = await receive(crew.manager.email);
		expect(more).toEqual([]);
		expect(letter!.text).toContain('/erasures');
		for (const person of [crew.installer, crew.engineer])
			await expect(listErasures(person)).rejects.toMatchObject({ code: 'not_allowed' });
		const { manager: neighbour } = await makeCrew();
		const decided = decideErasure(neighbour, request.id, GRANT(request.version));
		await expect(decided).rejects.toMatchObject({ code: 'not_found' });
	}, 60_000);

	it('is counted for the manager alone, with the oldest, and stands on the customer’s jobs', async () => {
		const crew = await makeCrew();
		const { manager, customer, workshopId } = crew;
		expect(await countWaitingErasures(manager)).toEqual({ count: 0, oldestAt: null });
		expect(await findWaitingErasure(manager, customer.customerId!)).toBeNull();
		await askErasure(customer);
		const aged = await Customer.create({ workshopId, name: 'Aged' });
		await Erasure.create({ workshopId, customerId: aged.id });
		const [request, byRule] = await listErasures(manager);
		expect(await countWaitingErasures(manager)).toEqual({ count: 2, oldestAt: request!.askedAt });
		expect(await findWaitingErasure(manager, customer.customerId!)).toEqual({
			...{ id: request!.id, askedAt: request!.askedAt, isByRule: false }
		});
		expect(await findWaitingErasure(manager, aged.id)).toMatchObject({ id: byRule!.id, isByRule: true });
		const { manager: neighbour } = await makeCrew();
		expect(await findWaitingErasure(neighbour, customer.customerId!)).toBeNull();
		expect(await findWaitingErasure(crew.installer, customer.customerId!)).toBeNull();
		await expect(countWaitingErasures(crew.engineer)).rejects.toMatchObject({ code: 'not_allowed' });
		const refusal = { decision: 'refuse', reason: 'Under warranty.', version: request!.version } as const;
		await decideErasure(manager, request!.id, refusal);
		expect(await countWaitingErasures(manager)).toMatchObject({ count: 1 });
	});

	it('is refused with a reason, word for word in a letter, and everything stays', async () => {
		const { crew, customer, known, request } = await makeRequest();
		const refuse = (reason: string) =>
			decideErasure(crew.manager, request.id, { decision: 'refuse', reason, version: request.version });
		await expect(refuse('')).rejects.toMatchObject({ code: 'invalid_input' });
		await refuse('The warranty runs until June.');
		expect(await getMyErasure(customer)).toMatchObject({ state: 'refused' });
		const letters = (await receive(known.email)).map(({ text }) => text).join();
		expect(letters).toContain('> The warranty runs until June.');
		expect(await findEverywhere(known.email)).toContain('customers.email');
		const again = decideErasure(crew.manager, request.id, GRANT(request.version));
		await expect(again).rejects.toMatchObject({ code: 'conflict' });
	}, 60_000);
});

describe('an erasure', () => {
	it('takes photos and documents of the mounts along, and leaves their contents to nobody', async () => {
		const { crew, jobId, request } = await makeRequest();
		const { id: mountId } = (await Mount.findOne({ where: { jobId } }))!;
		const photo = await telephonePhoto();
		const file = await asIncoming('a.jpg', photo, (sent) => addFile(crew.installer, mountId, sent));
		const contentId = await contentIdOf(file.id);
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		expect(await StoredFile.count({ where: { mountId } })).toBe(0);
		await clearFiles(new Date(Date.now() + 2 * 60 * 60_000));
		expect((await listKept()).filter((key) => key.includes(contentId))).toEqual([]);
	}, 60_000);

	it('is put before the manager by the rule of the shop, once for each whom it reaches', async () => {
		const { manager, customer, workshopId } = await makeCrew();
		await saveRetention(manager, { years: 2, version: 0 });
		const at = `${addMonths(today(), -30)} 12:00:00`;
		await connection().query('UPDATE customers SET updated_at = :at WHERE id = :id', {
			replacements: { at, id: customer.customerId! }
		});
		await askForAged();
		await askForAged();
		const asked = await listErasures(manager);
		expect(asked.map(({ customerId, state }) => [customerId, state])).toEqual([
			[customer.customerId, 'asked']
		]);
		await decideErasure(manager, asked[0]!.id, GRANT(asked[0]!.version));
		await askForAged();
		expect(await Erasure.count({ where: { workshopId } })).toBe(1);
		expect((await getRetention(manager)).preview.total).toBe(0);
	}, 60_000);

	it('by the rule comes after what a customer asked for, and again a year after a refusal', async () => {
		const { crew, request } = await makeRequest();
		const { manager, workshopId } = crew;
		const aged = await Customer.bulkCreate(
			Array.from({ length: 3 }, (_, at) => ({ workshopId, name: `Aged ${at}` }))
		);
		const at = `${addMonths(today(), -30)} 12:00:00`;
		await connection().query('UPDATE customers SET updated_at = :at WHERE id IN (:ids)', {
			replacements: { at, ids: aged.map(({ id }) => id) }
		});
		await saveRetention(manager, { years: 2, version: 0 });
		await askForAged();
		const [first, second] = await listErasures(manager);
		expect(first!.id).toBe(request.id);
		const refusal = { decision: 'refuse', reason: 'Under warranty.', version: second!.version } as const;
		await decideErasure(manager, second!.id, refusal);
		expect(await askForAged()).toBe(0);
		expect(await askForAged(addMonths(today(), 13))).toBeGreaterThan(0);
		expect(await Erasure.count({ where: { customerId: second!.customerId } })).toBe(2);
	}, 60_000);

	it('leaves nothing of the person in any column of any table, and tells them', async () => {
		const { crew, customer, known, request } = await makeRequest();
		await openSession(customer.id);
		// The search would find them: they stand in more than a dozen places.
		expect((await findEverywhere(known.surname)).length).toBeGreaterThan(12);
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		const letter = await OutgoingMail.findOne({
			where: { workshopId: crew.workshopId, kind: 'erasure-granted' }
		});
		expect(letter).toMatchObject({ recipient: known.email, state: 'waiting' });
		await sendDue();
		for (const words of Object.values(known))
			expect([words, await findEverywhere(words)]).toEqual([words, []]);
		const kept = await listKeptLetters(env().MAILBOX_DIR!, 500);
		const arrived = kept.find(({ messageId }) => messageId === letter!.messageId);
		const mail = await readKeptLetter(arrived!.file);
		expect(mail.to).toMatchObject({ text: known.email });
		expect(mail.text).toContain('has deleted what it held about you');
	}, 60_000);

	it('leaves nobody to remind', async () => {
		const { crew, jobId, request } = await makeRequest();
		expect(await findReminded(crew.installer, jobId)).toBe('customer');
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		expect(await findReminded(crew.installer, jobId)).toBe('erased');
	}, 60_000);

	it('ends sign-in and links, and keeps what was measured and worked out', async () => {
		const { crew, customer, request, token, assessmentId, jobId } = await makeRequest();
		const session = await openSession(customer.id);
		expect(await personOfSession(session)).not.toBeNull();
		const before = (await Assessment.findByPk(assessmentId))!;
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		expect(await personOfSession(session)).toBeNull();
		await expect(openSheet(token)).rejects.toMatchObject({ code: 'not_found' });
		const after = (await Assessment.findByPk(assessmentId))!;
		expect(after.result).toEqual(before.result);
		expect(after.inputs).toMatchObject({ customerName: '(erased)', scenario: before.inputs.scenario });
		const again = await reproduceAssessment(crew.engineer, assessmentId);
		expect(again).toMatchObject({ same: true, inputsIntact: true });
		expect(await Installation.count({ where: { jobId } })).toBe(1);
		expect(await listQuestions(crew.installer, jobId)).toMatchObject([
			{ name: '(erased)', words: '(erased)', answers: [{ name: crew.installer.name, words: '(erased)' }] }
		]);
		expect(await listErasures(crew.manager)).toMatchObject([{ customerName: '(erased)', state: 'granted' }]);
	}, 60_000);

	it('leaves the trail whole, and an emptied entry that no erasure names is found', async () => {
		const { crew, request } = await makeRequest();
		const { workshopId } = crew;
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		expect(await findBreak(workshopId)).toBeNull();
		const entries = await AuditEntry.findAll({ where: { workshopId } });
		const emptied = entries.filter(({ detail }) => 'erasure' in detail);
		expect(emptied.length).toBeGreaterThan(4);
		const other = entries.find(({ action }) => action === 'sheet.question')!;
		expect(other.detail).not.toHaveProperty('erasure');
		await andUndo(async () => {
			// What a second program would have to do to get past the trigger.
			await Erasure.update({ state: 'running' }, { where: { id: request.id } });
			await other.update({ detail: { erasure: request.id } });
			expect(await findBreak(workshopId)).toBe(`entry ${other.sequence} was changed`);
		});
		expect(await findBreak(workshopId)).toBeNull();
	}, 60_000);

	it('is the only way to change what is immutable, and its triggers let nothing else through', async () => {
		const { crew, request, jobId } = await makeRequest();
		const { workshopId } = crew;
		const inJob = { where: { jobId } };
		const changes = () => [
			() => Recommendation.update({ reason: 'Another.' }, inJob),
			() => Assessment.update({ inputsSha256: '0'.repeat(64) }, inJob),
			() => Acknowledgement.update({ name: 'Another' }, { where: {} }),
			() => FieldNote.update({ notedOn: '2026-02-11' }, { where: { workshopId } }),
			() => FieldNoteStrike.update({ reason: 'Another reason.' }, { where: { workshopId } }),
			() => AuditEntry.update({ detail: {} }, { where: { workshopId } })
		];
		for (const change of changes()) await expect(change()).rejects.toThrow(/immutable|append-only/);
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		for (const change of changes()) await expect(change()).rejects.toThrow(/immutable|append-only/);
		await andUndo(async () => {
			await Erasure.update({ state: 'running' }, { where: { id: request.id } });
			const verdict = Assessment.update({ verdict: 'rides-it-out', headroomK: 99 }, inJob);
			await expect(verdict).rejects.toThrow('immutable');
			const warned = Recommendation.update({ cautions: [] }, inJob);
			await expect(warned).rejects.toThrow('immutable');
			const struck = FieldNoteStrike.update({ createdBy: crew.manager.id }, { where: { workshopId } });
			await expect(struck).rejects.toThrow('immutable');
			const acknowledged = Acknowledgement.update({ contentSha256: '0'.repeat(64) }, { where: {} });
			await expect(acknowledged).rejects.toThrow('immutable');
		});
	}, 60_000);

	it('leaves the names of the shop alone', async () => {
		const { crew, request } = await makeRequest();
		await decideErasure(crew.manager, request.id, GRANT(request.version));
		expect((await Workshop.findByPk(crew.workshopId))!.name).toBe(crew.manager.workshopName);
		expect(await findEverywhere(crew.installer.name)).toContain('people.name');
	}, 60_000);
});
