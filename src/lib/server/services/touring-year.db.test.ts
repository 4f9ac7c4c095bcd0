import { describe, expect, it } from 'vitest';
import { makeAssessableJob } from '../../../../tests/support/assessable-job';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { makeEpw } from '../../../../tests/support/weather-files';
import type { SignedInPerson } from '$lib/schemas/people';
import { estimateMonths } from '$lib/thermal/weather';
import { Assessment, Job } from '../db/models';
import { findJobParts } from './assessment-inputs';
import { hashInputs } from './run-inputs';
import { assessMount, getAssessment, reproduceAssessment } from './assessments';
import { getJob, setJobClimate } from './jobs';
import { readWeather, takeWeather } from './place-weather';
import { getPlace, updatePlace } from './places';
import { touringYearOf } from './touring-year';

useTestDatabase();

const FOUR_EACH = Array<number>(12).fill(4);
const DAYS = [12, 8, 2, 0, 0, 0, 6, 0, 2, 4, 6, 31];
const MAX_C = [34, 33, 31, 27, 22, 18, 17, 20, 24, 28, 31, 33];
const SPREAD_K = [3, 3, 3.2, 3.5, 3, 2.5, 2.5, 3, 4, 4.2, 4, 3.5];

async function touringOf(jobId: number) {
	const { job, place } = await findJobParts((await Job.findByPk(jobId))!);
	return touringYearOf({ job, place: place! });
}

async function changePlace(person: SignedInPerson, jobId: number, changes: object): Promise<void> {
	const { place } = await getJob(person, jobId);
	const { version, ...known } = await getPlace(person, place!.id);
	await updatePlace(person, place!.id, { ...known, ...changes, version });
}

async function setDays(person: SignedInPerson, jobId: number, daysOnRoad: number[] | null): Promise<void> {
	const { place, hotDay, version } = await getJob(person, jobId);
	await setJobClimate(person, jobId, { placeId: place!.id, ...hotDay!, daysOnRoad, version });
}

describe('the touring year of a job', () => {
	it('is estimated where the place has no months, with the usual four days each month', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		const { latitudeDeg, hotDayMaxC } = (await getJob(installer, jobId)).place!;
		expect(await touringOf(jobId)).toEqual({
			months: estimateMonths({ latitudeDeg, hotDayMaxC }),
			daysOnRoad: FOUR_EACH,
			basis: 'Estimated from latitude and hot day; a weather file would replace it.'
		});
	});

	it('is that of the place where somebody entered its months, and says where they had them', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		const months = {
			monthlyMaxC: MAX_C,
			monthlySpreadK: SPREAD_K,
			monthsSource: 'Our own log, 2019 to 2024'
		};
		await changePlace(installer, jobId, months);
		await setDays(installer, jobId, DAYS);
		const touring = await touringOf(jobId);
		expect(touring.basis).toBe('Entered for the place: Our own log, 2019 to 2024');
		expect(touring.daysOnRoad).toEqual(DAYS);
		expect(touring.months[0]).toEqual({ meanMaxC: 34, spreadK: 3 });
		expect(touring.months.map(({ spreadK }) => spreadK)).toEqual(SPREAD_K);
	});

	it('is that of the weather file, and names it', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		const { id, version } = (await getJob(installer, jobId)).place!;
		const reading = readWeather({ name: 'lake.epw', bytes: new TextEncoder().encode(makeEpw()) });
		await takeWeather(installer, id, reading, { takeHotDay: false, takeSite: false, version });
		const { basis, months } = await touringOf(jobId);
		expect(basis).toBe('From the weather file lake.epw.');
		expect(months.map(({ meanMaxC }) => meanMaxC)).toEqual(reading.monthlyMaxC);
	});
});

describe('the days on the road', () => {
	it('are the usual again when they are taken away', async () => {
		const { installer } = await makeCrew();
		const { jobId } = await makeAssessableJob(installer);
		expect((await getJob(installer, jobId)).daysOnRoad).toBeNull();
		await setDays(installer, jobId, DAYS);
		expect((await getJob(installer, jobId)).daysOnRoad).toEqual(DAYS);
		await setDays(installer, jobId, null);
		expect((await getJob(installer, jobId)).daysOnRoad).toBeNull();
	});
});

describe('an assessment', () => {
	it('keeps the touring year, and is made anew when it changes', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		const first = await assessMount(installer, { mountId: hot.id });
		expect(first.inputs.touring).toEqual(await touringOf(jobId));
		await setDays(installer, jobId, DAYS);
		expect((await getJob(installer, jobId)).standings[0]?.changedSince).toEqual(['touring']);
		const second = await assessMount(installer, { mountId: hot.id });
		expect(second.id).not.toBe(first.id);
		expect(second.inputs.touring?.daysOnRoad).toEqual(DAYS);
		expect((await getJob(installer, jobId)).standings[0]?.changedSince).toEqual([]);
		expect((await getAssessment(installer, first.id)).inputs.touring?.daysOnRoad).toEqual(FOUR_EACH);
	});

	it('from before it was kept still shows, reproduces, and is not told as changed', async () => {
		const { installer } = await makeCrew();
		const { jobId, hot } = await makeAssessableJob(installer);
		const { id: newId } = await assessMount(installer, { mountId: hot.id });
		const { id: _id, inputs, ...stored } = (await Assessment.findByPk(newId))!.toJSON();
		const { touring: _touring, ...before } = inputs;
		const old = await Assessment.create({ ...stored, inputs: before, inputsSha256: hashInputs(before) });
		const shown = await getAssessment(installer, old.id);
		expect(shown.inputs.touring).toBeUndefined();
		expect(shown.isCurrent).toBe(true);
		expect(await reproduceAssessment(installer, old.id)).toMatchObject({ same: true, inputsIntact: true });
		expect((await getJob(installer, jobId)).standings[0]).toMatchObject({
			...{ assessmentId: old.id, changedSince: [] }
		});
	});
});
