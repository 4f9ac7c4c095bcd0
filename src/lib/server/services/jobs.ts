import { QueryTypes, type Transaction } from 'sequelize';
import type {
	JobBattery,
	JobClimate,
	JobPage,
	JobQuery,
	JobView,
	NewJob,
	RepeatJob
} from '$lib/schemas/jobs';
import type { SignedInPerson } from '$lib/schemas/people';
import { connection } from '../db/connection';
import { BatteryRecord, DayPlan, Job, Mount, Place, Vehicle } from '../db/models';
import { inTransaction } from '../db/transaction';
import { notFound } from '../errors';
import { allow } from '../policies';
import { presentJob, presentJobRow } from '../presenters/jobs';
import { recordBy, type AuditAction } from './audit';
import { customerFor } from './customers';
import { findJobs } from './job-list';
import { countOpenQuestions } from './question-threads';
import { notThere, saveVersioned } from './records';
import { refreshReview } from './review/keep-review';
import { findStandings } from './standings';
import { addVehicle } from './vehicles';

export async function listJobs(person: SignedInPerson, query: JobQuery): Promise<JobPage> {
	allow(person, 'jobs.read');
	const { jobs, total, next } = await findJobs(person.workshopId, query);
	const open = await countOpenQuestions(jobs.map(({ id }) => id));
	return { rows: jobs.map((job) => presentJobRow(job, open.get(job.id) ?? 0)), total, next };
}

export async function getJob(person: SignedInPerson, jobId: number): Promise<JobView> {
	allow(person, 'jobs.read');
	const { workshopId } = person;
	const job = await Job.findOne({
		where: { id: jobId, workshopId },
		include: ['customer', 'vehicle', 'batteryRecord', 'place']
	});
	if (!job) throw notFound('job');
	const [mounts, dayPlan] = await Promise.all([
		Mount.findAll({ where: { jobId, workshopId, removedAt: null }, order: [['letter', 'ASC']] }),
		DayPlan.findOne({ where: { jobId, workshopId } })
	]);
	return presentJob(job, mounts, dayPlan, await findStandings(job, mounts, dayPlan));
}

/** Numbers run within a workshop; its row is held, so that two jobs begun at once get two numbers. */
async function takeJobNumber(workshopId: number, transaction: Transaction): Promise<number> {
	const [row] = await connection().query<{ number: number }>(
		'SELECT next_job_number AS number FROM workshops WHERE id = :workshopId FOR UPDATE',
		{ replacements: { workshopId }, transaction, type: QueryTypes.SELECT }
	);
	if (!row) throw notFound('workshop');
	await connection().query(
		'UPDATE workshops SET next_job_number = next_job_number + 1 WHERE id = :workshopId',
		{ replacements: { workshopId }, transaction }
	);
	return row.number;
}

/** A new job brings its customer and its vehicle: all three are kept, or none. */
export async function createJob(person: SignedInPerson, input: NewJob): Promise<JobView> {
	allow(person, 'jobs.write');
	const { customerName, customerEmail, customerPhone, note, ...vehicleInput } = input;
	const { workshopId } = person;
	return inTransaction(async (transaction) => {
		const number = await takeJobNumber(workshopId, transaction);
		const contact = { name: customerName, email: customerEmail, phone: customerPhone };
		const customerId = await customerFor(person, contact, transaction);
		const vehicleId = await addVehicle(person, customerId, vehicleInput, transaction);
		const job = await Job.create(
			{ workshopId, number, customerId, vehicleId, note, createdBy: person.id },
			{ transaction }
		);
		const detail = { number, customerId, vehicleId, note };
		await recordBy(person, 'job.created', { type: 'job', id: job.id }, transaction, detail);
		return getJob(person, job.id);
	});
}

function keptFrom(before: Job | null) {
	if (!before) return {};
	const { batteryRecordId, placeId, hotDayMaxC, dailyRangeK, sunPeakWPerM2, daysOnRoad } = before;
	return { batteryRecordId, placeId, hotDayMaxC, dailyRangeK, sunPeakWPerM2, daysOnRoad };
}

/** Another job on a known vehicle begins with the battery, the hot day and the days on the road of the one before. */
export async function repeatJob(person: SignedInPerson, { vehicleId, note }: RepeatJob): Promise<JobView> {
	allow(person, 'jobs.write');
	const { workshopId } = person;
	return inTransaction(async (transaction) => {
		const number = await takeJobNumber(workshopId, transaction);
		const vehicle = await Vehicle.findOne({ where: { id: vehicleId, workshopId }, transaction });
		if (!vehicle) throw notFound('vehicle');
		const { customerId } = vehicle;
		const before = await Job.findOne({
			where: { vehicleId, workshopId },
			order: [['number', 'DESC']],
			transaction
		});
		const job = await Job.create(
			{ ...keptFrom(before), workshopId, number, customerId, vehicleId, note, createdBy: person.id },
			{ transaction }
		);
		const detail = { number, customerId, vehicleId, note, repeats: before?.number ?? null };
		await recordBy(person, 'job.created', { type: 'job', id: job.id }, transaction, detail);
		return getJob(person, job.id);
	});
}

/** The job comes first: of another workshop's nothing is said, not even what is wrong with the question. */
async function findJob(
	{ workshopId }: SignedInPerson,
	jobId: number,
	transaction: Transaction
): Promise<Job> {
	const job = await Job.findOne({ where: { id: jobId, workshopId }, transaction });
	if (!job) throw notFound('job');
	return job;
}

async function changeJob(
	person: SignedInPerson,
	job: Job,
	action: AuditAction,
	version: number,
	changes: Partial<JobClimate> & { batteryRecordId?: number },
	transaction: Transaction
): Promise<JobView> {
	await saveVersioned(job, 'job', version, changes, transaction);
	await refreshReview('job', job.id, transaction);
	await recordBy(person, action, { type: 'job', id: job.id }, transaction, changes);
	return getJob(person, job.id);
}

export async function setJobBattery(
	person: SignedInPerson,
	jobId: number,
	{ batteryRecordId, version }: JobBattery
): Promise<JobView> {
	allow(person, 'jobs.write');
	return inTransaction(async (transaction) => {
		const job = await findJob(person, jobId, transaction);
		const where = { id: batteryRecordId, workshopId: person.workshopId };
		if (!(await BatteryRecord.findOne({ where, attributes: ['id'], transaction }))) {
			throw notThere('battery', 'batteryRecordId');
		}
		return changeJob(person, job, 'job.battery-set', version, { batteryRecordId }, transaction);
	});
}

export async function setJobClimate(
	person: SignedInPerson,
	jobId: number,
	{ version, ...climate }: JobClimate
): Promise<JobView> {
	allow(person, 'jobs.write');
	return inTransaction(async (transaction) => {
		const job = await findJob(person, jobId, transaction);
		const where = { id: climate.placeId, workshopId: person.workshopId };
		if (!(await Place.findOne({ where, attributes: ['id'], transaction }))) {
			throw notThere('place', 'placeId');
		}
		return changeJob(person, job, 'job.climate-set', version, climate, transaction);
	});
}
