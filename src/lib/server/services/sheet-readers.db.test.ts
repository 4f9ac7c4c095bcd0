import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeSentSheet } from '../../../../tests/support/sheets';
import { Acknowledgement, AuditEntry, Job, Sheet } from '../db/models';
import { newToken } from '../hash';
import { findBreak } from './audit';
import { acknowledgeMySheet, acknowledgeSheet, getMySheet, listMySheets, openSheet } from './sheet-readers';
import { listSheets, sendSheet, withdrawSheet } from './sheets';

useTestDatabase();

const entriesOf = (sheetId: number, action: string) =>
	AuditEntry.findAll({ where: { subjectType: 'sheet', subjectId: sheetId, action } });
const read = async (token: string, name = 'Ilse Tarn') => {
	const { contentSha256 } = await openSheet(token);
	return { name, understood: true as const, contentSha256 };
};

describe('opening a sheet by its link', () => {
	it('shows the stored words and acknowledges nothing, however often it is done', async () => {
		const { sheet, token } = await makeSentSheet();
		const stored = (await Sheet.findByPk(sheet.id))!;
		for (let time = 0; time < 3; time++) {
			expect(await openSheet(token)).toEqual({
				content: stored.content,
				contentSha256: stored.contentSha256,
				textVersion: stored.textVersion,
				acknowledgement: null,
				logo: null,
				newerSentAt: null,
				questions: [],
				lessons: []
			});
		}
		expect(await Acknowledgement.count({ where: { sheetId: sheet.id } })).toBe(0);
	});

	it('notes the first opening once, with nobody signed in, even when many open it at once', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		await Promise.all(Array.from({ length: 6 }, () => openSheet(token)));
		const [noted, ...more] = await entriesOf(sheet.id, 'sheet.link-opened');
		expect(more).toEqual([]);
		expect(noted).toMatchObject({ personId: null, workshopId: crew.workshopId });
		const [first] = await listSheets(crew.installer, jobId);
		await openSheet(token);
		const [later] = await listSheets(crew.installer, jobId);
		expect(first!.linkFirstOpenedAt).not.toBeNull();
		expect(later!.linkFirstOpenedAt).toBe(first!.linkFirstOpenedAt);
	});

	it('tells whoever reads an acknowledged page that the shop has sent a newer one', async () => {
		const { crew, sheet, token, recommendationId } = await makeSentSheet();
		await acknowledgeSheet(token, await read(token));
		await sendSheet(crew.installer, { recommendationId, sendTo: sheet.sentTo });
		const [newest] = await listSheets(crew.installer, (await Sheet.findByPk(sheet.id))!.jobId);
		expect((await openSheet(token)).newerSentAt).toBe(newest!.createdAt);
	});

	it('finds nothing behind a link that was never made', async () => {
		for (const token of [newToken(), '', 'x'.repeat(5_000), "' OR 1=1 --"]) {
			await expect(openSheet(token)).rejects.toMatchObject({ code: 'not_found' });
		}
	});

	it('is refused when the stored words are no longer the ones that were sent', async () => {
		const { sheet, token } = await makeSentSheet();
		const { content } = (await Sheet.findByPk(sheet.id))!;
		const given = await read(token);
		await Sheet.update({ content: { ...content, summary: 'All is well.' } }, { where: { id: sheet.id } });
		await expect(openSheet(token)).rejects.toMatchObject({ code: 'conflict' });
		await expect(acknowledgeSheet(token, given)).rejects.toMatchObject({ code: 'conflict' });
		expect(await Acknowledgement.count({ where: { sheetId: sheet.id } })).toBe(0);
	});
});

describe('acknowledging a sheet', () => {
	it('keeps name, version and hash of what was read, tells the shop, and moves the job on', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		const given = await read(token);
		await acknowledgeSheet(token, given);
		const stored = await Acknowledgement.findOne({ where: { sheetId: sheet.id } });
		const { textVersion, contentSha256 } = (await Sheet.findByPk(sheet.id))!;
		expect(stored).toMatchObject({ name: 'Ilse Tarn', textVersion, contentSha256 });
		expect((await openSheet(token)).acknowledgement).toMatchObject({ name: 'Ilse Tarn' });
		expect((await listSheets(crew.manager, jobId))[0]).toMatchObject({ acknowledgedBy: 'Ilse Tarn' });
		expect((await Job.findByPk(jobId))!.stage).toBe('acknowledged');
		const [entry] = await entriesOf(sheet.id, 'sheet.acknowledged');
		expect(entry).toMatchObject({ personId: null, detail: { name: 'Ilse Tarn', contentSha256 } });
		expect(await findBreak(crew.workshopId)).toBeNull();
	});

	it('at the same moment makes one row, and everybody sees the same name', async () => {
		const { sheet, token } = await makeSentSheet();
		const given = await Promise.all(['Ilse', 'Jorun', 'Kester', 'Lomas'].map((name) => read(token, name)));
		const seen = await Promise.all(given.map((each) => acknowledgeSheet(token, each)));
		expect(new Set(seen.map(({ name }) => name)).size).toBe(1);
		expect(await Acknowledgement.count({ where: { sheetId: sheet.id } })).toBe(1);
		expect(await entriesOf(sheet.id, 'sheet.acknowledged')).toHaveLength(1);
	});

	it('is refused when the hash is not that of the page, and stores nothing', async () => {
		const { sheet, token } = await makeSentSheet();
		const given = { ...(await read(token)), contentSha256: '0'.repeat(64) };
		await expect(acknowledgeSheet(token, given)).rejects.toMatchObject({ code: 'changed_meanwhile' });
		expect(await Acknowledgement.count({ where: { sheetId: sheet.id } })).toBe(0);
	});

	it('is refused after the sheet was withdrawn', async () => {
		const { crew, sheet, token } = await makeSentSheet();
		const given = await read(token);
		await withdrawSheet(crew.installer, sheet.id);
		await expect(acknowledgeSheet(token, given)).rejects.toMatchObject({ code: 'gone' });
	});

	it('cannot be changed or deleted afterwards', async () => {
		const { sheet, token } = await makeSentSheet();
		await acknowledgeSheet(token, await read(token));
		const where = { sheetId: sheet.id };
		await expect(Acknowledgement.update({ name: 'Somebody' }, { where })).rejects.toThrow();
		await expect(Acknowledgement.destroy({ where })).rejects.toThrow();
		expect(await Acknowledgement.findOne({ where })).toMatchObject({ name: 'Ilse Tarn' });
	});
});

describe("a customer's own pages", () => {
	it('list and show their sheets, and take their acknowledgement under their own sign-in', async () => {
		const { crew, sheet } = await makeSentSheet();
		expect(await listMySheets(crew.customer)).toMatchObject([{ id: sheet.id, acknowledgedAt: null }]);
		const { contentSha256 } = await getMySheet(crew.customer, sheet.id);
		const given = { name: 'Ilse Tarn', understood: true as const, contentSha256 };
		await acknowledgeMySheet(crew.customer, sheet.id, given);
		expect((await getMySheet(crew.customer, sheet.id)).acknowledgement).toMatchObject({ name: 'Ilse Tarn' });
		const [entry] = await entriesOf(sheet.id, 'sheet.acknowledged');
		expect(entry).toMatchObject({ personId: crew.customer.id });
	});

	it('count as read, by a reader who is known, and not as an opened link', async () => {
		const { crew, sheet } = await makeSentSheet();
		await getMySheet(crew.customer, sheet.id);
		await getMySheet(crew.customer, sheet.id);
		expect((await Sheet.findByPk(sheet.id))!.firstOpenedAt).not.toBeNull();
		expect(await entriesOf(sheet.id, 'sheet.read')).toMatchObject([{ personId: crew.customer.id }]);
		expect(await entriesOf(sheet.id, 'sheet.link-opened')).toEqual([]);
	});

	it('leave a withdrawn sheet out of the list, and say so where it was', async () => {
		const { crew, sheet } = await makeSentSheet();
		await withdrawSheet(crew.installer, sheet.id);
		expect(await listMySheets(crew.customer)).toEqual([]);
		await expect(getMySheet(crew.customer, sheet.id)).rejects.toMatchObject({ code: 'gone' });
	});

	it('show nothing of another customer, of the same shop or of another', async () => {
		const { crew, jobId, sheet } = await makeSentSheet();
		const { contentSha256 } = await getMySheet(crew.customer, sheet.id);
		const elsewhere = (await makeCrew()).customer;
		const sameShop = { ...elsewhere, workshopId: crew.workshopId };
		for (const other of [elsewhere, sameShop]) {
			expect(await listMySheets(other)).toEqual([]);
			await expect(getMySheet(other, sheet.id)).rejects.toMatchObject({ code: 'not_found' });
			const given = { name: 'Not me', understood: true as const, contentSha256 };
			await expect(acknowledgeMySheet(other, sheet.id, given)).rejects.toMatchObject({ code: 'not_found' });
		}
		expect((await listSheets(crew.installer, jobId))[0]).toMatchObject({ acknowledgedBy: null });
	});

	it.each(['installer', 'engineer', 'manager'] as const)('are closed to the %s of the shop', async (role) => {
		const { crew, sheet } = await makeSentSheet();
		await expect(listMySheets(crew[role])).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(getMySheet(crew[role], sheet.id)).rejects.toMatchObject({ code: 'not_allowed' });
	});
});
