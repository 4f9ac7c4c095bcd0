import { Assessment, BatteryRecord, Job } from '../../src/lib/server/db/models';
import { assessJob } from '../../src/lib/server/services/assessments';
import { LIGHT_LEARNING } from '../../src/lib/server/services/field-findings';
import { addFieldNote } from '../../src/lib/server/services/field-notes';
import { saveFitting } from '../../src/lib/server/services/fittings';
import { ensureOutlook } from '../../src/lib/server/services/outlooks';
import { makeRecommendation } from '../../src/lib/server/services/recommendations';
import { BATTERY, makeAssessableJob } from './assessable-job';
import { FITTED } from './fitted';
import { makeCrew } from './services';
import { LIGHT_EFFORT } from './sheets';

const DECISION = { decidedBy: 'Ilse Tarn', reason: 'No other place; a duct follows before summer.' };
const LOW = { ...BATTERY, maker: 'Fenmoor', model: 'Low 65', dischargeCutC: 65, dischargeResetC: 55 };
export const FITTED_INSTEAD = 'Fenmoor Low 65';

/** Two evenings as the fitted battery has them in this mount, and the agreed one never. */
export const EVENINGS = [
	{
		...({ kind: 'cut-out', notedOn: '2026-02-10', hottestDayC: 32, withinHours: 0.5 } as const),
		...{ wentDarkHour: 17.6, cameBackHour: 19.8 }
	},
	{
		...({ kind: 'cut-out', notedOn: '2026-02-12', hottestDayC: 33, withinHours: 0.5 } as const),
		...{ wentDarkHour: 15.6, cameBackHour: 19.9 }
	}
] as const;

/** The same, but back sooner than any cells cool: no draw of any mount has such a day. */
export const BRIEF_EVENINGS = EVENINGS.map((evening) => ({
	...evening,
	...{ cameBackHour: evening.wentDarkHour + 0.6, withinHours: 0.1 }
}));

/**
 * A job of the crew's customer: agreed on was a battery that goes dark at 110 °C, and fitted was what is said; with the ways
 * to note an evening, to recommend anew as it was fitted, and to save the fitting.
 */
export async function makeAgreedFor110(battery = FITTED_INSTEAD) {
	const crew = await makeCrew();
	const { installer } = crew;
	const { jobId, hot } = await makeAssessableJob(installer, { dischargeCutC: 110, dischargeResetC: 95 });
	await Job.update({ customerId: crew.customer.customerId! }, { where: { id: jobId } });
	const recommend = async () => {
		const [ofHot] = await assessJob(installer, jobId);
		await ensureOutlook((await Assessment.findByPk(ofHot!.id))!, LIGHT_EFFORT);
		return makeRecommendation(installer, { assessmentId: ofHot!.id, ...DECISION });
	};
	const chooseFitted = async () => {
		const record = await BatteryRecord.create({ ...LOW, workshopId: crew.workshopId });
		await Job.update({ batteryRecordId: record.id }, { where: { id: jobId } });
	};
	const agreed = await recommend();
	const differences = battery ? [{ key: 'battery' as const, fitted: battery }] : [];
	await saveFitting(installer, hot.id, { ...FITTED, differences });
	const note = async (data: (typeof EVENINGS | typeof BRIEF_EVENINGS)[number]) =>
		addFieldNote(installer, hot.id, data, LIGHT_LEARNING);
	return { crew, installer, jobId, mountId: hot.id, agreed, recommend, chooseFitted, note };
}
