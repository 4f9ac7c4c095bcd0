import { strFromU8, unzipSync } from 'fflate';
import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { makeKnownCustomer } from '../../../../tests/support/known-customer';
import { asIncoming, telephonePhoto } from '../../../../tests/support/pictures';
import { useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, Mount } from '../db/models';
import { addFile } from './files';
import { getHeldData, packHeldData } from './held-data';

useTestDatabase();

describe('what is held about a customer', () => {
	it('goes out as one parcel: a first page to read, the data, and every page as text', async () => {
		const { known, customer, crew, jobId, sheet } = await makeKnownCustomer();
		const mount = (await Mount.findOne({ where: { jobId, letter: 'A' } }))!;
		const photo = await asIncoming('corner.jpg', await telephonePhoto(300, 200), (file) =>
			addFile(crew.installer, mount.id, file)
		);
		const parcel = unzipSync(await packHeldData(customer));
		expect(Object.keys(parcel).sort()).toEqual([
			...['data.json', `documents/handover-${mount.id}.pdf`, `documents/page-${sheet.id}.txt`],
			...[`documents/recommendation-${sheet.recommendationId}.pdf`, `files/photo-${photo.id}.jpg`],
			'read-me-first.txt'
		]);
		const read = (path: string): string => strFromU8(parcel[path]!);
		for (const words of [known.name, known.email, known.phone, known.registration]) {
			expect(read('read-me-first.txt')).toContain(words);
			expect(read('data.json')).toContain(words);
		}
		expect(read(`documents/page-${sheet.id}.txt`)).toContain(`Prepared for ${known.name}`);
		const seen = await sharp(parcel[`files/photo-${photo.id}.jpg`]!).metadata();
		expect(seen.format).toBe('jpeg');
		const data = JSON.parse(read('data.json')) as Awaited<ReturnType<typeof getHeldData>>;
		expect(data.jobs).toHaveLength(1);
		expect(data.jobs[0]!.questions).toMatchObject([{ words: known.question, name: known.name }]);
		expect(data.jobs[0]!.pages).toMatchObject([{ sentTo: known.email, acknowledged: { by: known.name } }]);
		// What the story tells no more is held all the same, with why it was struck out.
		expect(data.jobs[0]!.notesStruckOut).toMatchObject([
			{
				...{ about: 'Inspection', notedOn: '2026-02-10' },
				asNoted: { words: expect.stringContaining(known.surname) },
				reason: `Ms ${known.surname} said so of another battery.`
			}
		]);
		expect(read('read-me-first.txt')).toContain('Struck out by the shop on');
		expect(data.letters.map(({ about }) => about)).toContain('The customer’s page');
	}, 60_000);

	it('holds no secret and nothing of anybody else, and that it was taken is on record', async () => {
		const { customer, crew, token } = await makeKnownCustomer();
		const other = await makeKnownCustomer();
		const text = JSON.stringify(await getHeldData(customer));
		for (const secret of [token, 'tokenHash', 'passwordHash', other.known.surname])
			expect(text).not.toContain(secret);
		const where = { action: 'customer.data-taken', subjectId: customer.customerId! };
		expect(await AuditEntry.findAll({ where })).toMatchObject([{ personId: customer.id }]);
		await expect(getHeldData(crew.manager)).rejects.toMatchObject({ code: 'not_allowed' });
	}, 60_000);
});
