import type { Transaction } from 'sequelize';
import type { DayPlanInput, DayPlanView } from '$lib/schemas/day-plans';
import type { SignedInPerson } from '$lib/schemas/people';
import { DayPlan, Job } from '../db/models';
import { inTransaction } from '../db/transaction';
import { changedMeanwhile, notFound } from '../errors';
import { allow } from '../policies';
import { presentDayPlan } from '../presenters/day-plans';
import { recordBy } from './audit';
import { saveVersioned } from './records';

/** The version that was seen; null where the job had no day plan yet. */
export type DayPlanSave = DayPlanInput & { version: number | null };

async function findJob(person: SignedInPerson, jobId: number, transaction?: Transaction): Promise<Job> {
	const job = await Job.findOne({
		where: { id: jobId, workshopId: person.workshopId },
		attributes: ['id'],
		...(transaction ? { transaction, lock: transaction.LOCK.UPDATE } : {})
	});
	if (!job) throw notFound('job');
	return job;
}

export async function getDayPlan(person: SignedInPerson, jobId: number): Promise<DayPlanView | null> {
	allow(person, 'jobs.read');
	const { id } = await findJob(person, jobId);
	const plan = await DayPlan.findOne({ where: { jobId: id, workshopId: person.workshopId } });
	return plan && presentDayPlan(plan);
}

/** Draws the job's day for the first time, or changes it if nobody did since it was read. */
export async function saveDayPlan(
	person: SignedInPerson,
	jobId: number,
	{ version, ...input }: DayPlanSave
): Promise<DayPlanView> {
	allow(person, 'day-plans.write');
	const { workshopId } = person;
	return inTransaction(async (transaction) => {
		// Held, so that two first saves of one job wait for one another.
		await findJob(person, jobId, transaction);
		const known = await DayPlan.findOne({ where: { jobId, workshopId }, transaction });
		if ((known === null) !== (version === null)) throw changedMeanwhile('day plan');
		if (known && version !== null) await saveVersioned(known, 'day plan', version, input, transaction);
		const plan = known ?? (await DayPlan.create({ ...input, workshopId, jobId }, { transaction }));
		const subject = { type: 'day-plan', id: plan.id };
		const action = known ? 'day-plan.changed' : 'day-plan.drawn';
		await recordBy(person, action, subject, transaction, { jobId, ...input });
		return presentDayPlan(plan);
	});
}
