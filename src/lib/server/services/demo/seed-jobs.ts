import type { Transaction } from 'sequelize';
import { dayPlanInputSchema } from '$lib/schemas/day-plans';
import { newJobSchema, type JobView } from '$lib/schemas/jobs';
import type { SignedInPerson } from '$lib/schemas/people';
import { surveyAnswersSchema } from '$lib/schemas/survey';
import { DAY_PLAN_TEMPLATES } from '$lib/thermal/survey';
import demoJobs from '../../../../../seeds/demo-jobs.json';
import neighbourJobs from '../../../../../seeds/demo-neighbour-jobs.json';
import { assessJob } from '../assessments';
import { listBatteries } from '../batteries';
import { saveDayPlan } from '../day-plans';
import { createJob, setJobBattery, setJobClimate } from '../jobs';
import { addMount, saveSurvey } from '../mounts';
import { listPlaces } from '../places';
import { getRecommendation, makeRecommendation } from '../recommendations';
import { seedFitting, TODAY } from './seed-fittings';
import { seedSheet } from './seed-sheets';
import type { Crew } from './seed-people';

type DemoJob = (typeof demoJobs)[number] | (typeof neighbourJobs)[number];

const JOBS: Record<string, readonly DemoJob[]> = {
	'wattle-and-wire': demoJobs,
	'lantern-track': neighbourJobs
};

/** A mount of which more is known than where it would go. */
const isMeasured = ({ survey }: { survey: object }): boolean => Object.keys(survey).length > 1;

function findNamed<T>(things: readonly T[], nameOf: (thing: T) => string, name: string): T {
	const found = things.find((thing) => nameOf(thing) === name);
	if (!found) throw new Error(`The demo data name "${name}", which is not there.`);
	return found;
}

async function enterJob(
	person: SignedInPerson,
	{ customer, vehicle, note, ...demo }: DemoJob
): Promise<JobView> {
	const { name: customerName, email: customerEmail, phone: customerPhone } = customer;
	const input = newJobSchema.parse({ ...vehicle, customerName, customerEmail, customerPhone, note });
	let job = await createJob(person, input);
	const battery = findNamed(
		await listBatteries(person),
		({ maker, model }) => `${maker} ${model}`,
		demo.battery
	);
	job = await setJobBattery(person, job.id, { batteryRecordId: battery.id, version: job.version });
	const { id: placeId, ...place } = findNamed(await listPlaces(person), ({ name }) => name, demo.place);
	const { hotDayMaxC, dailyRangeK, sunPeakWPerM2 } = place;
	const hotDay = { hotDayMaxC, dailyRangeK, sunPeakWPerM2 };
	return setJobClimate(person, job.id, { placeId, ...hotDay, daysOnRoad: null, version: job.version });
}

async function measureMounts(
	person: SignedInPerson,
	job: JobView,
	{ mounts, dayPlan }: DemoJob
): Promise<void> {
	const { plan } = findNamed(DAY_PLAN_TEMPLATES, ({ id }) => id, dayPlan);
	await saveDayPlan(person, job.id, { ...dayPlanInputSchema.parse(plan), version: null });
	for (const { name, survey: answers } of mounts) {
		const survey = surveyAnswersSchema.parse(answers);
		const mount = await addMount(person, job.id, { name, positionKind: survey.positionKind });
		const complete = isMeasured({ survey: answers });
		await saveSurvey(person, mount.id, { survey, complete, version: mount.version });
	}
}

async function recommend(person: SignedInPerson, job: JobView, demo: DemoJob): Promise<number | null> {
	const assessments = await assessJob(person, job.id);
	if (!demo.recommend) return null;
	const letter = demo.recommend.mount;
	const chosen = findNamed(assessments, ({ mountLetter }) => mountLetter, letter);
	const override = 'override' in demo.recommend ? demo.recommend.override : undefined;
	const { id } = await makeRecommendation(person, { assessmentId: chosen.id, ...override });
	return id;
}

async function seedJob(person: SignedInPerson, demo: DemoJob, transaction: Transaction): Promise<void> {
	const job = await enterJob(person, demo);
	await measureMounts(person, job, demo);
	if (!demo.mounts.some(isMeasured)) return;
	const recommendationId = await recommend(person, job, demo);
	if (recommendationId === null) return;
	const acknowledged = demo.sheet === 'acknowledged';
	if (demo.sheet !== null)
		await seedSheet(person, { recommendationId, ...demo.customer, acknowledged }, transaction);
	const { assessment } = await getRecommendation(person, recommendationId);
	// What is acknowledged and says nothing else was fitted today.
	const fitted = ('fitted' in demo && demo.fitted) || (acknowledged && TODAY);
	if (fitted) await seedFitting(person, assessment.mountId, fitted, transaction);
}

/** The invented jobs of a demo workshop, made the way people make them: through the services, in turns. */
export async function seedJobs({ key, staff }: Crew, transaction: Transaction): Promise<number> {
	const jobs = JOBS[key] ?? [];
	for (const [index, demo] of jobs.entries()) {
		const person = staff[index % staff.length];
		if (person) await seedJob(person, demo, transaction);
	}
	return jobs.length;
}
