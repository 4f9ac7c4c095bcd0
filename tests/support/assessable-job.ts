import { inTransaction } from '../../src/lib/server/db/transaction';
import { BatteryRecord, CoefficientBook, DayPlan, Job, Mount, Place } from '../../src/lib/server/db/models';
import { createFirstBook } from '../../src/lib/server/services/books';
import type { BatteryInput } from '../../src/lib/schemas/batteries';
import type { SignedInPerson } from '../../src/lib/schemas/people';
import type { SurveyAnswers } from '../../src/lib/schemas/survey';
import { DAY_PLAN_TEMPLATES } from '../../src/lib/thermal/survey';
import { makeBareJob } from './jobs';

export const BATTERY: BatteryInput = {
	...{ maker: 'Cindervale', model: 'Ridge 100', chemistry: 'lithium-iron-phosphate', capacityAh: 100 },
	...{ lengthMm: 320, widthMm: 165, heightMm: 215, massKg: 12.85, internalResistanceMohm: 12 },
	...{ maxChargeA: 50, sensor: 'cells', chargeCutC: 60, chargeResetC: 50, dischargeCutC: 75 },
	...{ dischargeResetC: 62, cutDelayS: 0, autoReset: true, underBonnet: 'silent' },
	...{ underBonnetWords: '', dataSheet: 'Invented for the tests' }
};

export const PLACE = {
	...{ name: 'Salt Lake', region: 'North', latitudeDeg: -28, longitudeDeg: 137, altitudeM: 20 },
	...{ climateZone: 'BWh', hotDayMaxC: 44, dailyRangeK: 15, sunPeakWPerM2: 1050 },
	source: 'Invented for the tests'
};

/** By the exhaust, in still air: as hot as a bay gets. */
export const HOT_CORNER: SurveyAnswers = {
	...{ positionKind: 'under-bonnet', bayPlace: 'firewall-exhaust', exhaustFacing: 'square-on' },
	...{ exhaustGapMm: 60, exhaustSeenWidthMm: 400, exhaustSeenHeightMm: 200 },
	...{ exhaustBatterySide: 'long-side', engineFacing: 'at-an-angle', airPath: 'closed-corner' }
};
export const COOL_CABIN: SurveyAnswers = {
	...{ positionKind: 'cabin', enclosureCooling: 'cooled', enclosureSun: 'shaded' }
};

async function ensureBook(workshopId: number): Promise<void> {
	await inTransaction(async (transaction) => {
		if ((await CoefficientBook.count({ where: { workshopId } })) === 0) {
			await createFirstBook(workshopId, transaction);
		}
	});
}

export async function addSurveyedMount(
	jobId: number,
	workshopId: number,
	letter: string,
	survey: SurveyAnswers
): Promise<Mount> {
	const { positionKind } = survey;
	return Mount.create({
		...{ workshopId, jobId, letter, name: `Position ${letter}`, positionKind, survey, surveyComplete: true }
	});
}

/** A job with all that an assessment needs: mount A by the exhaust, mount B in a cooled cabin. */
export async function makeAssessableJob(
	person: SignedInPerson,
	battery: Partial<BatteryInput> = {}
): Promise<{ jobId: number; hot: Mount; cool: Mount }> {
	const { workshopId } = person;
	await ensureBook(workshopId);
	const jobId = await makeBareJob(person);
	const record = await BatteryRecord.create({ ...BATTERY, model: `Ridge ${jobId}`, ...battery, workshopId });
	const place = await Place.create({ ...PLACE, name: `Salt Lake ${jobId}`, workshopId });
	await Job.update({ batteryRecordId: record.id, placeId: place.id }, { where: { id: jobId } });
	await DayPlan.create({ ...DAY_PLAN_TEMPLATES[0]!.plan, jobId, workshopId });
	const hot = await addSurveyedMount(jobId, workshopId, 'A', HOT_CORNER);
	const cool = await addSurveyedMount(jobId, workshopId, 'B', COOL_CABIN);
	return { jobId, hot, cool };
}
