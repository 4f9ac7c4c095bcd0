import type { SignedInPerson } from '../../src/lib/schemas/people';
import { assessJob } from '../../src/lib/server/services/assessments';
import { saveFitting } from '../../src/lib/server/services/fittings';
import { makeRecommendation } from '../../src/lib/server/services/recommendations';
import { makeAssessableJob } from './assessable-job';

/** A job whose hot mount was recommended against its verdict. */
export async function makeRecommended(person: SignedInPerson) {
	const { jobId, hot, cool } = await makeAssessableJob(person);
	const [ofHot] = await assessJob(person, jobId);
	const why = { decidedBy: 'Ilse Tarn', reason: 'No other place; a duct is fitted before summer.' };
	const recommendation = await makeRecommendation(person, { assessmentId: ofHot!.id, ...why });
	return { jobId, mountId: hot.id, otherMountId: cool.id, assessment: ofHot!, recommendation };
}

export const FITTED = {
	...{ fittedOn: '2026-01-31', fittedBy: 'Ida Fenn', serialNumber: 'X-1', note: '' },
	...{ differences: [], version: null }
};

/** The same, fitted as agreed. */
export async function makeFitted(person: SignedInPerson) {
	const recommended = await makeRecommended(person);
	return { ...recommended, fitting: await saveFitting(person, recommended.mountId, FITTED) };
}
