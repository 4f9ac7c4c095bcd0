import { describe, expect, it } from 'vitest';
import { COOL_CABIN, addSurveyedMount, makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeBareJob } from '../../../../tests/support/jobs';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import type { BatteryInput } from '$lib/schemas/batteries';
import { ENGINE_VERSION } from '$lib/thermal';
import { connection } from '../db/connection';
import { Assessment, AuditEntry, BatteryRecord, DayPlan, Job, Mount } from '../db/models';
import { canonicalJson, sha256 } from '../hash';
import {
	assessJob,
	assessMount,
	getAssessment,
	listAssessments,
	listMountOutcomes,
	reproduceAssessment
} from './assessments';

useTestDatabase();

describe('an assessment', () => {
	it('keeps everything that went in, the book, the engine, and a hash of it', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const view = await assessMount(installer, { mountId: hot.id });
		expect(view).toMatchObject({ engineVersion: ENGINE_VERSION, bookNumber: 1, isCurrent: true });
		expect(view.assessedBy).toBe(installer.name);
		expect(view.inputs).toMatchObject({
			mount: { letter: 'A', survey: { exhaustGapMm: 60 } },
			battery: { capacityAh: 100, dischargeCutC: 75 },
			hotDay: { hotDayMaxC: 44 },
			book: { number: 1, coefficients: { engine: { thermostatOpen: 82 } } }
		});
		expect(view.inputs.derivations.length).toBeGreaterThan(10);
		expect(view.inputs.assumptions.length).toBeGreaterThan(0);
		expect(view.inputsSha256).toBe(sha256(canonicalJson(view.inputs)));
		expect(view.cautions).toContain('failing-lithium');
	});

	it('comes back from the database to the last digit', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const made = await assessMount(installer, { mountId: hot.id });
		expect(canonicalJson(await getAssessment(installer, made.id))).toBe(canonicalJson(made));
	});

	it('can be made again from what was stored, to the last digit', async () => {
		const { installer } = await makeCrew();
		const { hot, cool } = await makeAssessableJob(installer);
		for (const { id: mountId } of [hot, cool]) {
			const { id } = await assessMount(installer, { mountId });
			expect(await reproduceAssessment(installer, id)).toEqual({
				...{ same: true, inputsIntact: true },
				...{ engineThen: ENGINE_VERSION, engineNow: ENGINE_VERSION }
			});
		}
	});

	it('that was forged is found out', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const { id } = await assessMount(installer, { mountId: hot.id });
		const { id: _id, ...row } = (await Assessment.findByPk(id))!.get({ plain: true });
		const cooler = { ...row.result, peakCellsC: row.result.peakCellsC - 1e-9 };
		const wrongResult = await Assessment.create({ ...row, result: cooler });
		const wrongInputs = await Assessment.create({
			...row,
			inputs: { ...row.inputs, hotDay: { ...row.inputs.hotDay, hotDayMaxC: 43 } }
		});
		expect(await reproduceAssessment(installer, wrongResult.id)).toMatchObject({
			...{ same: false, inputsIntact: true }
		});
		expect(await reproduceAssessment(installer, wrongInputs.id)).toMatchObject({
			...{ same: false, inputsIntact: false }
		});
	});

	it('cannot be changed or deleted by anybody', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const { id } = await assessMount(installer, { mountId: hot.id });
		const run = (sql: string) => connection().query(sql, { replacements: { id } });
		await expect(run("UPDATE assessments SET verdict = 'rides-it-out' WHERE id = :id")).rejects.toThrow(
			/immutable/
		);
		await expect(run('DELETE FROM assessments WHERE id = :id')).rejects.toThrow(/immutable/);
		expect(await Assessment.count({ where: { id } })).toBe(1);
	});

	it('tells a hot corner from a cooled cabin, and the job says the better one', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		const [hot, cool] = await assessJob(installer, jobId);
		expect(hot!.verdict).toBe('cuts-out');
		expect(cool!.verdict).toBe('rides-it-out');
		expect(cool!.headroomK).toBeGreaterThan(hot!.headroomK + 10);
		const { stage, verdict, headroomK } = (await Job.findByPk(jobId))!;
		expect({ stage, verdict, headroomK }).toEqual({
			...{ stage: 'assessed', verdict: 'rides-it-out', headroomK: cool!.headroomK }
		});
	});

	it('is made once when nothing has changed since', async () => {
		const { installer, engineer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		const first = await assessMount(installer, { mountId: hot.id });
		const second = await assessMount(engineer, { mountId: hot.id });
		expect(second.id).toBe(first.id);
		expect(await listAssessments(installer, jobId)).toHaveLength(1);
		expect(await AuditEntry.count({ where: { action: 'assessment.made', subjectId: first.id } })).toBe(1);
	});

	it('goes out of date when the day changes, and a new one stands beside it', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		const before = await assessMount(installer, { mountId: hot.id });
		await DayPlan.update({ chargerMaxA: 20 }, { where: { jobId } });
		expect((await getAssessment(installer, before.id)).isCurrent).toBe(false);
		const after = await assessMount(installer, { mountId: hot.id });
		expect(after.peakCellsC).toBeLessThan(before.peakCellsC);
		const rows = await listAssessments(installer, jobId);
		expect(rows.map(({ id }) => id)).toEqual([after.id, before.id]);
		expect(await reproduceAssessment(installer, before.id)).toMatchObject({ same: true });
	});

	it('of a removed mount stays, and speaks for the job no longer', async () => {
		const { installer } = await makeCrew();
		const { jobId, cool } = await makeAssessableJob(installer);
		const [, ofCabin] = await assessJob(installer, jobId);
		await Mount.update({ removedAt: new Date() }, { where: { id: cool.id } });
		await assessJob(installer, jobId);
		expect((await Job.findByPk(jobId))!.verdict).toBe('cuts-out');
		expect((await getAssessment(installer, ofCabin!.id)).isCurrent).toBe(false);
		expect((await listMountOutcomes(installer, jobId)).map(({ letter }) => letter)).toEqual(['A']);
	});
});

/** No BMS: what its maker allows is all there is. */
const AGM: Partial<BatteryInput> = {
	...{ chemistry: 'lead-acid-agm', massKg: 28, internalResistanceMohm: 5, maxChargeA: 25 },
	...{ sensor: null, cutDelayS: null, autoReset: null },
	...{ chargeCutC: null, chargeResetC: null, dischargeCutC: null, dischargeResetC: null },
	...{ highestChargeC: 50, highestUseC: 60, ratedLifeYears: 6, compensatesCharge: false }
};

describe('an assessment of a battery that nothing switches off', () => {
	it('says how hot, how long and what its charger and its gas ask for, and can be made again', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer, AGM);
		const view = await assessMount(installer, { mountId: hot.id });
		expect(view).toMatchObject({
			chemistry: 'lead-acid-agm',
			verdict: 'cuts-out',
			cutAtHour: null,
			darkHours: 0
		});
		expect(view.result.events).toEqual([]);
		expect(view.result.leadAcid).toMatchObject({
			useLimitC: 60,
			chargeLimitC: 50,
			chargerCompensates: false
		});
		expect(view.result.leadAcid!.hoursAboveUseLimit).toBeGreaterThan(0);
		expect(view.headroomK).toBeCloseTo(60 - view.peakCellsC, 9);
		expect(view.cautions).toEqual(expect.arrayContaining(['vent-valve-regulated', 'hot-charge']));
		expect(await reproduceAssessment(installer, view.id)).toMatchObject({ same: true, inputsIntact: true });
	});

	it('goes out of date when a limit changes, though the day that was run is the same', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer, AGM);
		const before = await assessMount(installer, { mountId: hot.id });
		const { batteryRecordId } = (await Job.findByPk(jobId))!;
		await BatteryRecord.update({ highestUseC: 70 }, { where: { id: batteryRecordId! } });
		expect((await getAssessment(installer, before.id)).isCurrent).toBe(false);
		const after = await assessMount(installer, { mountId: hot.id });
		expect(after.headroomK).toBeCloseTo(before.headroomK + 10, 9);
		expect(canonicalJson(after.inputs.scenario)).toBe(canonicalJson(before.inputs.scenario));
	});

	it('tells the job by which words its verdict goes', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer, AGM);
		await assessJob(installer, jobId);
		expect((await Job.findByPk(jobId))!.assessedChemistry).toBe('lead-acid-agm');
	});
});

describe('what stands in the database from before there were other chemistries', () => {
	it('is shown and made again as it was', async () => {
		const { installer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		const { id } = await assessMount(installer, { mountId: hot.id });
		const { id: _id, ...row } = (await Assessment.findByPk(id))!.get({ plain: true });
		const { highestChargeC, highestUseC, ratedLifeYears, compensatesCharge, ...battery } = row.inputs.battery;
		expect([highestChargeC, highestUseC, ratedLifeYears, compensatesCharge]).toEqual([
			null,
			null,
			null,
			null
		]);
		const inputs = { ...row.inputs, battery };
		const old = await Assessment.create({ ...row, inputs, inputsSha256: sha256(canonicalJson(inputs)) });
		expect(await reproduceAssessment(installer, old.id)).toMatchObject({ same: true, inputsIntact: true });
		expect(await getAssessment(installer, old.id)).toMatchObject({ isCurrent: true, verdict: 'cuts-out' });
	});
});

describe('what cannot be assessed', () => {
	it('says all that is missing at once, and stores nothing', async () => {
		const { installer } = await makeCrew();
		const jobId = await makeBareJob(installer);
		const mount = await addSurveyedMount(jobId, installer.workshopId, 'A', COOL_CABIN);
		await makeAssessableJob(installer);
		await expect(assessMount(installer, { mountId: mount.id })).rejects.toMatchObject({
			code: 'conflict',
			problems: [{ path: 'battery' }, { path: 'place' }, { path: 'dayPlan' }]
		});
		expect(await listAssessments(installer, jobId)).toEqual([]);
		expect((await Job.findByPk(jobId))!.stage).toBe('survey');
	});

	it('says that a survey is not finished', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		await Mount.update({ surveyComplete: false }, { where: { jobId } });
		await expect(assessMount(installer, { mountId: hot.id })).rejects.toMatchObject({
			...{ code: 'conflict', problems: [{ path: 'survey' }] }
		});
		await expect(assessJob(installer, jobId)).rejects.toMatchObject({ code: 'conflict' });
	});

	it('all mounts of a job are assessed or none', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer, { capacityAh: 1_000, lengthMm: 50, widthMm: 50 });
		const made = await assessJob(installer, jobId);
		expect(made).toHaveLength(2);
		await DayPlan.destroy({ where: { jobId } });
		await expect(assessJob(installer, jobId)).rejects.toMatchObject({ code: 'conflict' });
		expect(await listAssessments(installer, jobId)).toHaveLength(2);
	});
});

describe('who may assess', () => {
	it('everyone of the workshop, but no customer', async () => {
		const { installer, engineer, manager, customer } = await makeCrew();
		const { hot } = await makeAssessableJob(installer);
		for (const person of [installer, engineer, manager]) {
			expect((await assessMount(person, { mountId: hot.id })).mountLetter).toBe('A');
		}
		await expect(assessMount(customer, { mountId: hot.id })).rejects.toMatchObject({ code: 'not_allowed' });
	});

	it('nobody of another workshop, who does not even learn that it is there', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		const { id } = await assessMount(installer, { mountId: hot.id });
		const { engineer: stranger } = await makeCrew();
		const attempts = await Promise.allSettled([
			assessMount(stranger, { mountId: hot.id }),
			assessJob(stranger, jobId),
			getAssessment(stranger, id),
			listAssessments(stranger, jobId),
			reproduceAssessment(stranger, id)
		]);
		for (const attempt of attempts) {
			expect(attempt).toMatchObject({ status: 'rejected', reason: { code: 'not_found' } });
		}
	});
});
