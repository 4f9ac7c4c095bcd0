import { describe, expect, it } from 'vitest';
import { DAY_PLAN_TEMPLATES } from '$lib/thermal/survey';
import type { DayPlanInput } from '$lib/schemas/day-plans';
import { makeBareJob } from '../../../../tests/support/jobs';
import { makeCrew, useTestDatabase } from '../../../../tests/support/services';
import { AuditEntry, DayPlan } from '../db/models';
import { getDayPlan, saveDayPlan } from './day-plans';

useTestDatabase();

const [TOWING, TRACK] = DAY_PLAN_TEMPLATES.map((template): DayPlanInput => template.plan) as [
	DayPlanInput,
	DayPlanInput
];

async function makeJob() {
	const crew = await makeCrew();
	return { crew, installer: crew.installer, jobId: await makeBareJob(crew.installer) };
}

describe('the day plan of a job', () => {
	it('is not there before it is drawn', async () => {
		const { installer, jobId } = await makeJob();
		expect(await getDayPlan(installer, jobId)).toBeNull();
	});

	it('comes back leg by leg as it was drawn', async () => {
		const { installer, jobId } = await makeJob();
		const drawn = await saveDayPlan(installer, jobId, { ...TOWING, version: null });
		expect(drawn).toEqual({ ...TOWING, id: drawn.id, jobId, version: 0 });
		expect(await getDayPlan(installer, jobId)).toEqual(drawn);
	});

	it('is changed by who saw its newest version', async () => {
		const { installer, jobId } = await makeJob();
		const { version } = await saveDayPlan(installer, jobId, { ...TOWING, version: null });
		const changed = await saveDayPlan(installer, jobId, { ...TRACK, version });
		expect(changed).toMatchObject({ name: TRACK.name, version: version + 1 });
		expect(await DayPlan.count({ where: { jobId } })).toBe(1);
	});

	it('refuses who saw an older version, or none, and keeps what is there', async () => {
		const { crew, installer, jobId } = await makeJob();
		const { version } = await saveDayPlan(installer, jobId, { ...TOWING, version: null });
		await saveDayPlan(crew.engineer, jobId, { ...TOWING, name: 'By the engineer', version });
		for (const seen of [version, null]) {
			await expect(saveDayPlan(installer, jobId, { ...TRACK, version: seen })).rejects.toMatchObject({
				code: 'changed_meanwhile'
			});
		}
		expect((await getDayPlan(installer, jobId))?.name).toBe('By the engineer');
	});

	it('is drawn once when two people draw it for the first time at the same moment', async () => {
		const { crew, installer, jobId } = await makeJob();
		const outcomes = await Promise.allSettled(
			[installer, crew.engineer, crew.manager].map((person) =>
				saveDayPlan(person, jobId, { ...TOWING, name: person.role, version: null })
			)
		);
		expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
		const refused = outcomes.flatMap((outcome) => (outcome.status === 'rejected' ? [outcome.reason] : []));
		for (const reason of refused) expect(reason).toMatchObject({ code: 'changed_meanwhile' });
		expect(await DayPlan.count({ where: { jobId } })).toBe(1);
	});

	it('is written into the audit trail', async () => {
		const { installer, jobId } = await makeJob();
		const { id, version } = await saveDayPlan(installer, jobId, { ...TOWING, version: null });
		await saveDayPlan(installer, jobId, { ...TRACK, version });
		const entries = await AuditEntry.findAll({
			where: { workshopId: installer.workshopId, subjectType: 'day-plan', subjectId: id },
			order: [['sequence', 'ASC']]
		});
		expect(entries.map((entry) => entry.action)).toEqual(['day-plan.drawn', 'day-plan.changed']);
	});

	it('is not there for another workshop, nor for customers', async () => {
		const { crew, jobId } = await makeJob();
		const { installer: stranger } = await makeCrew();
		const plan = { ...TOWING, version: null };
		await expect(getDayPlan(stranger, jobId)).rejects.toMatchObject({ code: 'not_found' });
		await expect(saveDayPlan(stranger, jobId, plan)).rejects.toMatchObject({ code: 'not_found' });
		await expect(getDayPlan(crew.customer, jobId)).rejects.toMatchObject({ code: 'not_allowed' });
		await expect(saveDayPlan(crew.customer, jobId, plan)).rejects.toMatchObject({ code: 'not_allowed' });
		expect(await DayPlan.count({ where: { jobId } })).toBe(0);
	});
});
