import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { FITTED } from '../../../../tests/support/fitted';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { connection } from '../db/connection';
import { Job, Mount, Place, Recommendation } from '../db/models';
import { assessJob } from './assessments';
import { saveFitting } from './fittings';
import {
	getRecommendation,
	getRecommendationDocument,
	listRecommendations,
	makeRecommendation,
	newestRecommendation
} from './recommendations';

useTestDatabase();

async function makeAssessedJob() {
	const crew = await makeCrew();
	const { jobId, hot, cool } = await makeAssessableJob(crew.installer);
	const [ofHot, ofCool] = await assessJob(crew.installer, jobId);
	return { crew, jobId, hot, cool, ofHot: ofHot!, ofCool: ofCool! };
}
const WHY = { decidedBy: 'Ilse Tarn', reason: 'No other place; will fit a duct before summer.' };

describe('a recommendation', () => {
	it('says which mount, by whom, and moves the job on', async () => {
		const { crew, jobId, ofCool } = await makeAssessedJob();
		const made = await makeRecommendation(crew.installer, { assessmentId: ofCool.id });
		expect(made).toMatchObject({
			...{ jobId, againstVerdict: false, decidedBy: null, reason: null },
			recommendedBy: crew.installer.name,
			assessment: { id: ofCool.id, mountLetter: 'B', verdict: 'rides-it-out' }
		});
		expect(await getRecommendation(crew.engineer, made.id)).toEqual(made);
		expect((await Job.findByPk(jobId))!.stage).toBe('recommended');
	});

	it('decides against nothing when the verdict is good, whatever was sent along', async () => {
		const { crew, ofCool } = await makeAssessedJob();
		const made = await makeRecommendation(crew.installer, { assessmentId: ofCool.id, ...WHY });
		expect(made).toMatchObject({ againstVerdict: false, decidedBy: null, reason: null });
	});

	it('against "cuts out" asks for a named person and a reason, and keeps both', async () => {
		const { crew, jobId, ofHot } = await makeAssessedJob();
		await expect(makeRecommendation(crew.installer, { assessmentId: ofHot.id })).rejects.toMatchObject({
			code: 'invalid_input',
			problems: [
				{ path: 'decidedBy', message: 'Say who decided to go ahead although it cuts out.' },
				{ path: 'reason', message: 'Say why it goes ahead although it cuts out.' }
			]
		});
		await expect(
			makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY, reason: '   ' })
		).rejects.toMatchObject({ problems: [{ path: 'reason' }] });
		await expect(
			makeRecommendation(crew.installer, { assessmentId: ofHot.id, decidedBy: 'x', reason: 'ok' })
		).rejects.toMatchObject({
			problems: [
				{ path: 'decidedBy', message: 'Who decided must have at least 3 characters: “x” has 1.' },
				{ path: 'reason', message: 'Reason must have at least 10 characters: “ok” has 2.' }
			]
		});
		expect(await Recommendation.count({ where: { jobId } })).toBe(0);
		const made = await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		expect(made).toMatchObject({ againstVerdict: true, ...WHY });
	});

	it('against a verdict without a reason is refused by the database itself', async () => {
		const { crew, jobId, ofHot } = await makeAssessedJob();
		const { id: createdBy, workshopId } = crew.installer;
		const bare = { workshopId, jobId, number: 1, assessmentId: ofHot.id, againstVerdict: true, createdBy };
		for (const words of [
			{ decidedBy: null, reason: null },
			{ decidedBy: '', reason: 'because' },
			{ decidedBy: 'Ilse Tarn', reason: '' }
		]) {
			await expect(Recommendation.create({ ...bare, ...words })).rejects.toThrow('recommendations_reasoned');
		}
		expect(await Recommendation.count({ where: { jobId } })).toBe(0);
	});

	it('lets the job say what the recommended mount does, even when another does better', async () => {
		const { crew, jobId, ofHot } = await makeAssessedJob();
		await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		const { verdict, headroomK } = (await Job.findByPk(jobId))!;
		expect({ verdict, headroomK }).toEqual({ verdict: 'cuts-out', headroomK: ofHot.headroomK });
	});

	it('is not made from an assessment that is out of date', async () => {
		const { crew, jobId, ofCool } = await makeAssessedJob();
		const { placeId } = (await Job.findByPk(jobId))!;
		await Place.update({ hotDayMaxC: 50 }, { where: { id: placeId! } });
		await expect(makeRecommendation(crew.installer, { assessmentId: ofCool.id })).rejects.toMatchObject({
			code: 'conflict'
		});
		expect(await newestRecommendation(crew.installer, jobId)).toBeNull();
	});

	it('stands beside an earlier one, which says so, and leaves the fitting where it was', async () => {
		const { crew, jobId, hot, ofHot, ofCool } = await makeAssessedJob();
		const first = await makeRecommendation(crew.installer, { assessmentId: ofHot.id, ...WHY });
		expect(first).toMatchObject({ replacedBy: null, isFittedUnder: false });
		await saveFitting(crew.installer, hot.id, FITTED);
		await makeRecommendation(crew.installer, { assessmentId: ofCool.id });
		expect((await getRecommendation(crew.installer, first.id)).replacedBy).toBeNull();
		const again = { decidedBy: 'Odo Marsh', reason: 'The duct is in, and it stays where it is.' };
		const later = await makeRecommendation(crew.manager, { assessmentId: ofHot.id, ...again });
		const made = await listRecommendations(crew.installer, jobId);
		expect(made.map(({ assessment }) => assessment.mountLetter)).toEqual(['A', 'B', 'A']);
		expect(made[0]).toMatchObject({ id: later.id, ...again, replacedBy: null, isFittedUnder: false });
		expect(made[2]).toMatchObject({
			...{ id: first.id, ...WHY, isFittedUnder: true },
			replacedBy: { id: later.id, number: 3, recommendedBy: crew.manager.name, createdAt: later.createdAt }
		});
	});

	it('is numbered within its job, also where two are made at once', async () => {
		const [{ crew, jobId, ofHot, ofCool }, other] = [await makeAssessedJob(), await makeAssessedJob()];
		const ofMount = (assessmentId: number) => makeRecommendation(crew.installer, { assessmentId, ...WHY });
		const made = await Promise.all([ofMount(ofHot.id), ofMount(ofCool.id), ofMount(ofHot.id)]);
		expect(made.map(({ number }) => number).sort()).toEqual([1, 2, 3]);
		const listed = await listRecommendations(crew.installer, jobId);
		expect(listed.map(({ number }) => number)).toEqual([3, 2, 1]);
		const elsewhere = { assessmentId: other.ofCool.id };
		expect(await makeRecommendation(other.crew.installer, elsewhere)).toMatchObject({ number: 1 });
	});

	it('cannot be changed or deleted', async () => {
		const { crew, ofCool } = await makeAssessedJob();
		const { id } = await makeRecommendation(crew.installer, { assessmentId: ofCool.id });
		const run = (sql: string) => connection().query(sql, { replacements: { id } });
		for (const change of ["reason = 'x'", 'number = 7'])
			await expect(run(`UPDATE recommendations SET ${change} WHERE id = :id`)).rejects.toThrow(/immutable/);
		await expect(run('DELETE FROM recommendations WHERE id = :id')).rejects.toThrow(/immutable/);
		expect(await getRecommendation(crew.installer, id)).toMatchObject({ id, reason: null });
	});

	it('prints the same later, whatever became of the other mounts', async () => {
		const { crew, jobId, hot, ofHot, ofCool } = await makeAssessedJob();
		const { id } = await makeRecommendation(crew.installer, { assessmentId: ofCool.id });
		const then = await getRecommendationDocument(crew.installer, id);
		expect(then.others).toMatchObject([{ letter: 'A', assessment: { id: ofHot.id } }]);
		const { placeId } = (await Job.findByPk(jobId))!;
		await Place.update({ hotDayMaxC: 30 }, { where: { id: placeId! } });
		await assessJob(crew.installer, jobId);
		await Mount.update({ removedAt: new Date() }, { where: { id: hot.id } });
		const later = await getRecommendationDocument(crew.installer, id);
		expect(later.others).toEqual(then.others);
		expect(later.assessment.result).toEqual(then.assessment.result);
	});
});

describe('who may recommend', () => {
	it('the workshop, not the customer, and nobody from elsewhere', async () => {
		const { crew, jobId, ofCool } = await makeAssessedJob();
		const { id } = await makeRecommendation(crew.manager, { assessmentId: ofCool.id });
		await expect(makeRecommendation(crew.customer, { assessmentId: ofCool.id })).rejects.toMatchObject({
			code: 'not_allowed'
		});
		const { engineer: stranger } = await makeCrew();
		const attempts = await Promise.allSettled([
			makeRecommendation(stranger, { assessmentId: ofCool.id }),
			getRecommendation(stranger, id),
			getRecommendationDocument(stranger, id)
		]);
		for (const attempt of attempts) {
			expect(attempt).toMatchObject({ status: 'rejected', reason: { code: 'not_found' } });
		}
		expect(await newestRecommendation(stranger, jobId)).toBeNull();
	});
});
