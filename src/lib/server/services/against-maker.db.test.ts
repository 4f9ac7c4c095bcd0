import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { FITTED } from '../../../../tests/support/fitted';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { LIGHT_EFFORT } from '../../../../tests/support/sheets';
import { Assessment, AuditEntry, BatteryRecord, Job, Place, Recommendation, Sheet } from '../db/models';
import { assessJob, getAssessment } from './assessments';
import { saveFitting } from './fittings';
import { ensureOutlook } from './outlooks';
import { makeRecommendation } from './recommendations';
import { writeReviewCsv } from './review/review-csv';
import { listInstallations } from './review/review-list';
import { sendSheet } from './sheets';
import { reviewListQuerySchema } from '$lib/schemas/review';

useTestDatabase();

const WHY = { decidedBy: 'Ilse Tarn', reason: 'The maker was asked, and answered in a letter.' };
const EXCLUDED = { underBonnet: 'excluded', underBonnetWords: 'Not for engine bays.' } as const;
const ALTHOUGH = 'although the battery’s maker does not allow it under the bonnet.';
const overrides = reviewListQuerySchema.parse({ list: 'overrides' });

/** A mild day: under the bonnet the battery does not cut out, and its maker forbids it all the same. */
async function makeForbiddenJob() {
	const crew = await makeCrew();
	const { jobId, hot } = await makeAssessableJob(crew.installer, EXCLUDED);
	const { placeId, batteryRecordId } = (await Job.findByPk(jobId))!;
	await Place.update({ hotDayMaxC: 14 }, { where: { id: placeId! } });
	const [ofHot, ofCool] = await assessJob(crew.installer, jobId);
	expect(ofHot!.verdict).not.toBe('cuts-out');
	await ensureOutlook((await Assessment.findByPk(ofHot!.id))!, LIGHT_EFFORT);
	return { crew, jobId, mountId: hot.id, batteryRecordId: batteryRecordId!, ofHot: ofHot!, ofCool: ofCool! };
}

describe('a mount that the battery’s maker does not allow', () => {
	it('takes a named person and a reason whatever the verdict, and keeps both on record', async () => {
		const { crew, ofHot } = await makeForbiddenJob();
		await expect(makeRecommendation(crew.installer, { assessmentId: ofHot.id })).rejects.toMatchObject({
			code: 'invalid_input',
			problems: [
				{ path: 'decidedBy', message: `Say who decided to go ahead ${ALTHOUGH}` },
				{ path: 'reason', message: `Say why it goes ahead ${ALTHOUGH}` }
			]
		});
		const made = await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		expect(made).toMatchObject({ againstVerdict: false, againstMaker: true, ...WHY });
		const where = { subjectType: 'recommendation', subjectId: made.id };
		expect((await AuditEntry.findOne({ where }))!.detail).toMatchObject({ againstMaker: true, ...WHY });
	});

	it('asks for nobody where the maker’s word is not about the place', async () => {
		const { crew, ofCool } = await makeForbiddenJob();
		const made = await makeRecommendation(crew.installer, { assessmentId: ofCool.id });
		expect(made).toMatchObject({ againstVerdict: false, againstMaker: false, decidedBy: null });
	});

	it('is refused by the database itself without a reason', async () => {
		const { crew, jobId, ofHot } = await makeForbiddenJob();
		const { id: createdBy, workshopId } = crew.installer;
		const bare = {
			...{ workshopId, jobId, number: 1, assessmentId: ofHot.id },
			...{ createdBy, againstVerdict: false }
		};
		const nobody = { againstMaker: true, decidedBy: null, reason: null };
		await expect(Recommendation.create({ ...bare, ...nobody })).rejects.toThrow('recommendations_reasoned');
		expect(await Recommendation.count({ where: { jobId } })).toBe(0);
	});

	it('is not recommended from before the maker’s word was known', async () => {
		const { crew, batteryRecordId, ofHot } = await makeForbiddenJob();
		expect((await getAssessment(crew.installer, ofHot.id)).isCurrent).toBe(true);
		await BatteryRecord.update({ underBonnet: 'silent' }, { where: { id: batteryRecordId } });
		expect((await getAssessment(crew.installer, ofHot.id)).isCurrent).toBe(false);
	});

	it('goes to the customer with who decided, not as recommended', async () => {
		const { crew, ofHot } = await makeForbiddenJob();
		const { id } = await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		const { sheet } = await sendSheet(crew.installer, {
			...{ recommendationId: id, sendTo: 'ilse@travellers.example' }
		});
		const { content } = (await Sheet.findByPk(sheet.id))!;
		expect(content.override).toEqual(WHY);
		expect(content.advice).not.toContain('We recommend');
		expect(content.paragraphs[0]).toContain('“Not for engine bays.”');
	});

	it('recommended before anybody was asked, reads as it was and does not go out', async () => {
		const { crew, jobId, ofHot } = await makeForbiddenJob();
		const { id: createdBy, workshopId } = crew.installer;
		const { id } = await Recommendation.create({
			...{ workshopId, jobId, number: 1, assessmentId: ofHot.id, createdBy, againstVerdict: false },
			...{ decidedBy: null, reason: null }
		});
		const sending = sendSheet(crew.installer, { recommendationId: id, sendTo: 'ilse@travellers.example' });
		await expect(sending).rejects.toMatchObject({
			code: 'conflict',
			message: expect.stringContaining('names nobody who decided to go ahead') as string
		});
		expect(await Sheet.count({ where: { jobId } })).toBe(0);
	});

	it('stands in the review among what went ahead, and in its table', async () => {
		const { crew, mountId, ofHot } = await makeForbiddenJob();
		await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		await saveFitting(crew.installer, mountId, FITTED);
		const { rows } = await listInstallations(crew.manager, overrides);
		expect(rows).toMatchObject([
			{ mountId, override: { againstVerdict: false, againstMaker: true, ...WHY } }
		]);
		const pieces: string[] = [];
		for await (const piece of writeReviewCsv(crew.manager, overrides)) pieces.push(piece);
		expect(pieces.join('')).toContain(`the maker’s word,${WHY.decidedBy},`);
	});
});
