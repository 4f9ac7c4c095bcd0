import { describe, expect, it } from 'vitest';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeRecommendedJob, makeSentSheet, readToken } from '../../../../tests/support/sheets';
import { AuditEntry, Job, OutgoingMail, Sheet } from '../db/models';
import { canonicalJson, sha256 } from '../hash';
import { acknowledgeSheet, openSheet } from './sheet-readers';
import { makeRecommendation } from './recommendations';
import { listSheets, retrySheetLetter, sendSheet, withdrawSheet } from './sheets';

useTestDatabase();

const SEND_TO = 'ilse@travellers.example';
const actionsOn = async (sheetId: number): Promise<string[]> => {
	const where = { subjectType: 'sheet', subjectId: sheetId };
	return (await AuditEntry.findAll({ where, order: [['sequence', 'ASC']] })).map(({ action }) => action);
};
const stageOf = async (jobId: number) => (await Job.findByPk(jobId))!.stage;

describe('sending a sheet', () => {
	it('stores the words and their hash, posts the link in a letter and moves the job on', async () => {
		const { crew, jobId, sheet, assessment } = await makeSentSheet();
		const stored = (await Sheet.findByPk(sheet.id))!;
		expect(stored.content).toMatchObject({
			...{ customerName: assessment.inputs.customerName, verdict: 'cuts-out', mountName: 'Position A' },
			preparedBy: crew.installer.name,
			override: { decidedBy: 'Ilse Tarn' },
			alternatives: [{ mountName: 'Position B', verdict: 'rides-it-out' }]
		});
		expect(stored.content.ribbon.curves).toEqual(assessment.result.curves);
		expect(sha256(canonicalJson(stored.content))).toBe(stored.contentSha256);
		expect(sheet).toMatchObject({
			...{ sentTo: SEND_TO, mail: 'waiting', sentBy: crew.installer.name, acknowledgedAt: null },
			...{ linkFirstOpenedAt: null, withdrawnAt: null, mountName: 'Position A', verdict: 'cuts-out' }
		});
		expect(await stageOf(jobId)).toBe('sent');
		expect(await actionsOn(sheet.id)).toEqual(['sheet.sent']);
	});

	it('keeps of the link only a hash: 128 random bits stand in the letter and nowhere else', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		expect(Buffer.from(token, 'base64url')).toHaveLength(16);
		const row = JSON.stringify(await Sheet.findByPk(sheet.id));
		const trail = JSON.stringify(await AuditEntry.findAll({ where: { workshopId: crew.workshopId } }));
		const shown = JSON.stringify(await listSheets(crew.manager, jobId));
		for (const text of [row, trail, shown]) expect(text).not.toContain(token);
	});

	it('again makes a new link and stops the one before, whose waiting letter stays unsent', async () => {
		const { crew, jobId, sheet, token, recommendationId } = await makeSentSheet();
		const again = await sendSheet(crew.engineer, { recommendationId, sendTo: 'other@travellers.example' });
		await expect(openSheet(token)).rejects.toMatchObject({ code: 'gone' });
		expect(await openSheet(await readToken(again.sheet.id))).toMatchObject({ acknowledgement: null });
		const [newer, older] = await listSheets(crew.installer, jobId);
		expect(newer).toMatchObject({ id: again.sheet.id, withdrawnAt: null, sentBy: crew.engineer.name });
		expect(older).toMatchObject({
			...{ id: sheet.id, mail: 'failed' },
			mailError: 'Not sent: the sheet was withdrawn first.'
		});
		expect(older!.withdrawnAt).not.toBeNull();
		expect(await actionsOn(sheet.id)).toEqual(['sheet.sent', 'sheet.withdrawn']);
	});

	it('twice at the same moment leaves one link that opens', async () => {
		const { crew, jobId, recommendationId } = await makeRecommendedJob();
		const input = { recommendationId, sendTo: SEND_TO };
		await Promise.all([1, 2, 3].map(() => sendSheet(crew.installer, input)));
		const sheets = await listSheets(crew.installer, jobId);
		expect(sheets).toHaveLength(3);
		expect(sheets.filter(({ withdrawnAt }) => withdrawnAt === null)).toHaveLength(1);
	});

	it('is refused beside one that its sender did not know of, and done once they do', async () => {
		const { crew, jobId, recommendationId, sheet, token } = await makeSentSheet();
		const input = { recommendationId, sendTo: SEND_TO };
		await expect(sendSheet(crew.manager, { ...input, newestId: 0 })).rejects.toMatchObject({
			code: 'changed_meanwhile',
			message: expect.stringMatching(
				new RegExp(`^${crew.installer.name} sent this page to ${sheet.sentTo} on .*all the same\\?`)
			)
		});
		expect(await openSheet(token)).toMatchObject({ newerSentAt: null });
		await sendSheet(crew.manager, { ...input, newestId: sheet.id });
		await expect(openSheet(token)).rejects.toMatchObject({ status: 410 });
		const [newest] = await listSheets(crew.installer, jobId);
		await withdrawSheet(crew.installer, newest!.id);
		// What was withdrawn meanwhile is dead already.
		await sendSheet(crew.manager, { ...input, newestId: sheet.id });
		expect(await listSheets(crew.installer, jobId)).toHaveLength(3);
	});

	it('leaves an acknowledged sheet open beside the new one', async () => {
		const { crew, recommendationId, token } = await makeSentSheet();
		const { contentSha256 } = await openSheet(token);
		await acknowledgeSheet(token, { name: 'Ilse Tarn', understood: true, contentSha256 });
		await sendSheet(crew.installer, { recommendationId, sendTo: SEND_TO });
		expect((await openSheet(token)).acknowledgement).toMatchObject({ name: 'Ilse Tarn' });
	});

	it('is refused for a recommendation that a newer one has replaced, and stores nothing', async () => {
		const { crew, jobId, assessments, recommendationId } = await makeRecommendedJob();
		const cool = assessments.find(({ verdict }) => verdict === 'rides-it-out')!;
		await makeRecommendation(crew.installer, { assessmentId: cool.id });
		await expect(sendSheet(crew.installer, { recommendationId, sendTo: SEND_TO })).rejects.toMatchObject({
			code: 'conflict',
			problems: [{ path: 'recommendationId' }]
		});
		expect(await Sheet.count({ where: { jobId } })).toBe(0);
		expect(await OutgoingMail.count({ where: { workshopId: crew.workshopId } })).toBe(0);
	});

	it('is refused when the recommendation belongs to another job', async () => {
		const { crew, recommendationId, jobId } = await makeRecommendedJob();
		const input = { recommendationId, sendTo: SEND_TO, jobId: jobId + 1_000_000 };
		await expect(sendSheet(crew.installer, input)).rejects.toMatchObject({ code: 'not_found' });
	});
});

describe('withdrawing a sheet', () => {
	it('stops the link with the shop named, and gives the job back its stage', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		const status = await withdrawSheet(crew.manager, sheet.id);
		expect(status.withdrawnAt).not.toBeNull();
		await expect(openSheet(token)).rejects.toMatchObject({
			status: 410,
			message: expect.stringContaining(crew.installer.workshopName)
		});
		expect(await stageOf(jobId)).toBe('recommended');
		expect(await actionsOn(sheet.id)).toEqual(['sheet.sent', 'sheet.withdrawn']);
	});

	it('a second time changes nothing', async () => {
		const { crew, sheet } = await makeSentSheet();
		const first = await withdrawSheet(crew.installer, sheet.id);
		expect(await withdrawSheet(crew.manager, sheet.id)).toEqual(first);
		expect(await actionsOn(sheet.id)).toEqual(['sheet.sent', 'sheet.withdrawn']);
	});

	it('keeps what was acknowledged on record', async () => {
		const { crew, jobId, sheet, token } = await makeSentSheet();
		const { contentSha256 } = await openSheet(token);
		await acknowledgeSheet(token, { name: 'Ilse Tarn', understood: true, contentSha256 });
		expect(await withdrawSheet(crew.installer, sheet.id)).toMatchObject({ acknowledgedBy: 'Ilse Tarn' });
		expect(await stageOf(jobId)).toBe('acknowledged');
	});
});

describe('trying a letter again', () => {
	it('gives it its tries back once it was given up, and not before', async () => {
		const { crew, sheet } = await makeSentSheet();
		await expect(retrySheetLetter(crew.installer, sheet.id)).rejects.toMatchObject({ code: 'conflict' });
		await OutgoingMail.update({ state: 'failed', attempts: 8 }, { where: { sheetId: sheet.id } });
		expect(await retrySheetLetter(crew.installer, sheet.id)).toMatchObject({
			mail: 'waiting',
			mailAttempts: 0
		});
		expect(await actionsOn(sheet.id)).toEqual(['sheet.sent', 'sheet.letter-tried-again']);
	});

	it('is refused for a sheet that was withdrawn', async () => {
		const { crew, sheet } = await makeSentSheet();
		await withdrawSheet(crew.installer, sheet.id);
		await expect(retrySheetLetter(crew.installer, sheet.id)).rejects.toMatchObject({ code: 'conflict' });
	});
});

describe('who may look and do', () => {
	it('another workshop finds neither the job, nor the recommendation, nor the sheet', async () => {
		const { jobId, sheet, recommendationId } = await makeSentSheet();
		const { manager: stranger } = await makeCrew();
		const tries = [
			() => listSheets(stranger, jobId),
			() => sendSheet(stranger, { recommendationId, sendTo: SEND_TO }),
			() => withdrawSheet(stranger, sheet.id),
			() => retrySheetLetter(stranger, sheet.id)
		];
		for (const attempt of tries) await expect(attempt()).rejects.toMatchObject({ code: 'not_found' });
		expect((await Sheet.findByPk(sheet.id))!.withdrawnAt).toBeNull();
	});

	it('a customer may neither list, send, withdraw nor try again', async () => {
		const { crew, jobId, sheet, recommendationId } = await makeSentSheet();
		const tries = [
			() => listSheets(crew.customer, jobId),
			() => sendSheet(crew.customer, { recommendationId, sendTo: SEND_TO }),
			() => withdrawSheet(crew.customer, sheet.id),
			() => retrySheetLetter(crew.customer, sheet.id)
		];
		for (const attempt of tries) await expect(attempt()).rejects.toMatchObject({ code: 'not_allowed' });
	});
});
