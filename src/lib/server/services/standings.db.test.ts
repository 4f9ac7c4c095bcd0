import { describe, expect, it } from 'vitest';
import type { SignedInPerson } from '$lib/schemas/people';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { Assessment, CoefficientBook } from '../db/models';
import { assessJob, assessMount } from './assessments';
import { getBattery, updateBattery } from './batteries';
import { getDayPlan, saveDayPlan } from './day-plans';
import { getJob, setJobClimate } from './jobs';
import { getMount, removeMount, saveSurvey } from './mounts';
import { getVehicle, updateVehicle } from './vehicles';

useTestDatabase();

async function changedParts(person: SignedInPerson, jobId: number): Promise<Record<number, string[]>> {
	const { standings } = await getJob(person, jobId);
	return Object.fromEntries(standings.map(({ mountId, changedSince }) => [mountId, changedSince]));
}

async function assessed(person: SignedInPerson) {
	const made = await makeAssessableJob(person);
	await assessJob(person, made.jobId);
	return { ...made, hotId: made.hot.id, coolId: made.cool.id };
}

describe('where the mounts of a job stand', () => {
	it('is nowhere before they are assessed', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		expect((await getJob(installer, jobId)).standings).toEqual([]);
	});

	it('is where the newest assessment of each put them, with nothing changed since', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		const newest = await assessMount(installer, { mountId: hotId });
		const job = await getJob(installer, jobId);
		expect(job.standings.map(({ mountId, changedSince }) => ({ mountId, changedSince }))).toEqual([
			{ mountId: hotId, changedSince: [] },
			{ mountId: coolId, changedSince: [] }
		]);
		const { id, verdict, headroomK } = newest;
		expect(job.standings[0]).toMatchObject({ assessmentId: id, verdict, headroomK });
	});

	it('leaves out a mount that was removed', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		await removeMount(installer, hotId);
		expect(await changedParts(installer, jobId)).toEqual({ [coolId]: [] });
	});
});

describe('what changed since the last assessment', () => {
	it('is the hot day, until the job is assessed again', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		const { version, place, hotDay } = await getJob(installer, jobId);
		await setJobClimate(installer, jobId, {
			placeId: place!.id,
			...hotDay!,
			hotDayMaxC: 31,
			daysOnRoad: null,
			version
		});
		expect(await changedParts(installer, jobId)).toEqual({ [hotId]: ['hot-day'], [coolId]: ['hot-day'] });
		await assessJob(installer, jobId);
		expect(await changedParts(installer, jobId)).toEqual({ [hotId]: [], [coolId]: [] });
	});

	it('is the survey of the one mount whose answers changed', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		const { survey, version } = await getMount(installer, hotId);
		const changed = { ...survey, exhaustGapMm: 400 };
		await saveSurvey(installer, hotId, { survey: changed, complete: false, version });
		expect(await changedParts(installer, jobId)).toEqual({ [hotId]: ['survey'], [coolId]: [] });
	});

	it('is the battery, the vehicle and the day, each when its own record changed', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId } = await assessed(installer);
		const job = await getJob(installer, jobId);
		const { id: batteryId, ...battery } = await getBattery(installer, job.battery!.id);
		await updateBattery(installer, batteryId, { ...battery, dischargeCutC: 70 });
		const { id: vehicleId, customerId: _owner, ...vehicle } = await getVehicle(installer, job.vehicle.id);
		await updateVehicle(installer, vehicleId, { ...vehicle, towMassKg: 2500 });
		const plan = (await getDayPlan(installer, jobId))!;
		await saveDayPlan(installer, jobId, { ...plan, chargerMaxA: plan.chargerMaxA + 5 });
		expect((await changedParts(installer, jobId))[hotId]).toEqual(['vehicle', 'battery', 'day-plan']);
	});

	it('is the book when the workshop has put another in force', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		const where = { workshopId: installer.workshopId };
		await CoefficientBook.update({ state: 'withdrawn' }, { where });
		await CoefficientBook.create({ ...where, number: 2, name: 'Tuned', state: 'in-force' });
		expect(await changedParts(installer, jobId)).toEqual({ [hotId]: ['book'], [coolId]: ['book'] });
	});

	it('is the engine when an assessment was made with an older one', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId, coolId } = await assessed(installer);
		const { id: _id, ...newest } = (await Assessment.findOne({ where: { mountId: hotId } }))!.toJSON();
		await Assessment.create({ ...newest, engineVersion: '0.0.1' });
		expect(await changedParts(installer, jobId)).toEqual({ [hotId]: ['engine'], [coolId]: [] });
	});

	it('is not a number plate, nor the name of a day', async () => {
		const { installer } = await makeCrew();
		const { jobId, hotId } = await assessed(installer);
		const { vehicle } = await getJob(installer, jobId);
		const { id, customerId: _owner, ...input } = vehicle;
		await updateVehicle(installer, id, { ...input, registration: 'WREN 42' });
		const plan = (await getDayPlan(installer, jobId))!;
		await saveDayPlan(installer, jobId, { ...plan, name: 'The same day by another name' });
		expect((await changedParts(installer, jobId))[hotId]).toEqual([]);
	});
});
