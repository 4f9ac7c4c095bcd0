import { describe, expect, it } from 'vitest';
import { useTestDatabase } from '../../../../tests/support/services';
import { makeRecommendedJob } from '../../../../tests/support/sheets';
import { Customer, Job, OutgoingMail, Recommendation, Sheet } from '../db/models';
import { getRecommendation, makeRecommendation } from './recommendations';
import { sendSheet } from './sheets';

useTestDatabase();

const NEW_NAME = 'Zoë Vantongeren';
const WHY = { decidedBy: 'Ilse Tarn', reason: 'No other place; a duct follows before summer.' };

async function makeRenamed() {
	const made = await makeRecommendedJob();
	const { customerId } = (await Job.findByPk(made.jobId))!;
	await Customer.update({ name: NEW_NAME }, { where: { id: customerId } });
	return made;
}

describe('a customer whose name was put right after a recommendation', () => {
	it('is greeted by the new name, in the letter and on the page', async () => {
		const { crew, recommendationId } = await makeRenamed();
		const { sheet } = await sendSheet(crew.installer, {
			...{ recommendationId, sendTo: 'zoe@travellers.example' }
		});
		expect((await Sheet.findByPk(sheet.id))!.content.customerName).toBe(NEW_NAME);
		const letter = await OutgoingMail.findOne({ where: { sheetId: sheet.id } });
		expect(letter!.textBody).toContain(`Hello ${NEW_NAME},`);
	});

	it('leaves the recommendation as it was, which says so; a new one has the new name', async () => {
		const { crew, recommendationId, assessment } = await makeRenamed();
		const { customerName } = assessment.inputs;
		const kept = await getRecommendation(crew.installer, recommendationId);
		expect(kept).toMatchObject({ madeOutTo: customerName, customerNow: NEW_NAME });
		const again = await makeRecommendation(crew.installer, { assessmentId: assessment.id, ...WHY });
		expect(again).toMatchObject({ madeOutTo: NEW_NAME, customerNow: null });
	});

	it('stands by the name of the assessment where a recommendation kept none of its own', async () => {
		const { crew, jobId, assessment } = await makeRenamed();
		const { id: createdBy, workshopId } = crew.installer;
		const { id } = await Recommendation.create({
			...{ workshopId, jobId, number: 9, assessmentId: assessment.id },
			...{ createdBy, againstVerdict: true, ...WHY }
		});
		const { customerName } = assessment.inputs;
		expect(await getRecommendation(crew.installer, id)).toMatchObject({ madeOutTo: customerName });
	});
});
