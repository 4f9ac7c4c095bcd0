import { Op, col, fn } from 'sequelize';
import type { AssessmentInputs } from '$lib/schemas/assessments';
import { batteryInputSchema } from '$lib/schemas/batteries';
import { cableInputSchema } from '$lib/schemas/cables';
import { dayPlanInputSchema } from '$lib/schemas/day-plans';
import type { AssessedPart, MountStanding } from '$lib/schemas/jobs';
import { hotDayFields } from '$lib/schemas/places';
import { surveyAnswersSchema } from '$lib/schemas/survey';
import { ENGINE_VERSION } from '$lib/thermal';
import { closestBook } from '$lib/schemas/books';
import { Assessment, type DayPlan, type Job, type Mount } from '../db/models';
import { canonicalJson } from '../hash';
import { presentHotDay, presentStanding } from '../presenters/jobs';
import { caseOf } from './assessment-inputs';
import { listInForce } from './books';
import { touringYearOf } from './touring-year';

/** What the job is now, in the parts that an assessment keeps. */
interface Now {
	job: Job;
	mount: Mount;
	dayPlan: DayPlan | null;
}

interface Part {
	part: AssessedPart;
	/** The fields that make a difference. */
	fields: readonly string[];
	then: (inputs: AssessmentInputs) => object | undefined;
	/** Beside what an older assessment did not keep there is nothing to compare. */
	now: (now: Now, then: AssessmentInputs) => object | null | undefined;
}

const PARTS: readonly Part[] = [
	{
		part: 'vehicle',
		fields: ['engineLayout', 'massKg', 'dragAreaM2', 'towMassKg', 'towDragAreaM2'],
		then: (inputs) => inputs.vehicle,
		now: ({ job }) => job.vehicle
	},
	{
		part: 'battery',
		fields: Object.keys(batteryInputSchema.shape),
		then: (inputs) => inputs.battery,
		now: ({ job }) => job.batteryRecord
	},
	{
		part: 'place',
		fields: ['name', 'region', 'latitudeDeg', 'longitudeDeg', 'altitudeM'],
		then: (inputs) => inputs.place,
		now: ({ job }) => job.place
	},
	{
		part: 'hot-day',
		fields: Object.keys(hotDayFields),
		then: (inputs) => inputs.hotDay,
		now: ({ job }) => presentHotDay(job)
	},
	{
		part: 'touring',
		fields: ['months', 'daysOnRoad'],
		then: (inputs) => inputs.touring,
		now: ({ job }, { touring }) => touring && job.place && touringYearOf({ job, place: job.place })
	},
	{
		part: 'day-plan',
		fields: Object.keys(dayPlanInputSchema.shape).filter((field) => field !== 'name'),
		then: (inputs) => inputs.dayPlan,
		now: ({ dayPlan }) => dayPlan
	},
	{
		part: 'cable',
		fields: Object.keys(cableInputSchema.shape),
		then: (inputs) => inputs.cable,
		now: ({ mount }) => mount.cable
	},
	{
		part: 'survey',
		fields: Object.keys(surveyAnswersSchema.shape),
		then: (inputs) => inputs.mount.survey,
		now: ({ mount }) => mount.survey
	}
];

function pick(from: object | null | undefined, fields: readonly string[]): unknown {
	if (!from) return null;
	const values = from as Record<string, unknown>;
	return Object.fromEntries(fields.map((field) => [field, values[field] ?? null]));
}

/** The parts of a job that are no longer what an assessment was made with. */
export function partsChangedSince(inputs: AssessmentInputs, now: Now): AssessedPart[] {
	return PARTS.filter(
		({ fields, then, now: partNow }) =>
			canonicalJson(pick(then(inputs), fields)) !== canonicalJson(pick(partNow(now, inputs), fields))
	).map(({ part }) => part);
}

/** Whether the workshop has put another book in force, or the engine is another one. */
function toolsChangedSince({ bookId, engineVersion }: Assessment, bookInForceId?: number): AssessedPart[] {
	const changed: AssessedPart[] = [];
	if (bookId !== bookInForceId) changed.push('book');
	if (engineVersion !== ENGINE_VERSION) changed.push('engine');
	return changed;
}

/** The newest assessment of each mount, and what was changed after it. */
export async function findStandings(
	job: Job,
	mounts: Mount[],
	dayPlan: DayPlan | null
): Promise<MountStanding[]> {
	const inForce = await listInForce(job.workshopId);
	const newest = await Assessment.findAll({
		attributes: [[fn('MAX', col('id')), 'id']],
		where: { jobId: job.id, mountId: mounts.map((mount) => mount.id) },
		group: ['mount_id']
	});
	const assessments = await Assessment.findAll({
		attributes: [
			...['id', 'mountId', 'chemistry', 'verdict', 'headroomK', 'createdAt', 'inputs'],
			...['bookId', 'engineVersion']
		],
		where: { id: { [Op.in]: newest.map((each) => each.id) } },
		order: [['mountId', 'ASC']]
	});
	return assessments.flatMap((assessment) => {
		const mount = mounts.find((each) => each.id === assessment.mountId);
		if (!mount) return [];
		const changed = [
			...partsChangedSince(assessment.inputs, { job, mount, dayPlan }),
			...toolsChangedSince(assessment, closestBook(inForce, caseOf({ vehicle: job.vehicle! }, mount))?.id)
		];
		return [presentStanding(assessment, changed)];
	});
}
