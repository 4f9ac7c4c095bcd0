import { Assessment, Job, OutgoingMail } from '../../src/lib/server/db/models';
import { assessJob } from '../../src/lib/server/services/assessments';
import { ensureOutlook } from '../../src/lib/server/services/outlooks';
import { makeRecommendation } from '../../src/lib/server/services/recommendations';
import { sendSheet } from '../../src/lib/server/services/sheets';
import type { OutlookEffort } from '../../src/lib/thermal/outlook';
import { makeAssessableJob } from './assessable-job';
import { makeCrew, type Crew } from './services';

/** Enough to go through every part, too little to be believed. */
export const LIGHT_EFFORT: OutlookEffort = {
	...{ daySamples: 16, yearSamples: 2, influencePoints: 2, influenceReplicates: 2 },
	...{ remedySamples: 2, remediesTogether: 1, envelopeSamples: 0 }
};
const DECISION = { decidedBy: 'Ilse Tarn', reason: 'No other place; a duct follows before summer.' };

/** A recommended job of the crew's own customer: the hot corner against its verdict, or the cool cabin. */
export async function makeRecommendedJob(
	which: 'hot' | 'cool' = 'hot',
	prepare: (crew: Crew) => Promise<void> = () => Promise.resolve()
) {
	const crew = await makeCrew();
	await prepare(crew);
	const { jobId, ...mounts } = await makeAssessableJob(crew.installer);
	await Job.update({ customerId: crew.customer.customerId! }, { where: { id: jobId } });
	const assessments = await assessJob(crew.installer, jobId);
	const chosen = assessments.find(({ mountId }) => mountId === mounts[which].id)!;
	const decision = which === 'hot' ? DECISION : {};
	await ensureOutlook((await Assessment.findByPk(chosen.id))!, LIGHT_EFFORT);
	const recommendation = await makeRecommendation(crew.installer, { assessmentId: chosen.id, ...decision });
	return { crew, jobId, assessment: chosen, assessments, recommendationId: recommendation.id };
}

/** What stands in the letter of a sheet, and nowhere else. */
export async function readToken(sheetId: number): Promise<string> {
	const letter = await OutgoingMail.findOne({ where: { sheetId } });
	return /\/sheet\/([\w-]+)/.exec(letter?.textBody ?? '')?.[1] ?? '';
}

export async function makeSentSheet(which: 'hot' | 'cool' = 'hot') {
	const job = await makeRecommendedJob(which);
	const { recommendationId, crew } = job;
	const { sheet } = await sendSheet(crew.installer, { recommendationId, sendTo: 'ilse@travellers.example' });
	return { ...job, sheet, token: await readToken(sheet.id) };
}
