import { z } from 'zod';
import { dayPlanInputSchema, dayPlanSchema } from '$lib/schemas/day-plans';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

const params = z.object({ jobId: idSchema });

export const dayPlanOperations = {
	get: defineOperation({
		id: 'getDayPlan',
		method: 'GET',
		path: '/api/v1/jobs/[jobId]/day-plan',
		action: 'jobs.read',
		summary: 'The day that a job plans for; null while there is none.',
		params,
		answer: z.object({ dayPlan: dayPlanSchema.nullable() }),
		status: 200
	}),
	save: defineOperation({
		id: 'saveDayPlan',
		method: 'PUT',
		path: '/api/v1/jobs/[jobId]/day-plan',
		action: 'day-plans.write',
		summary: 'Draws the day (version null) or changes it, if nobody did since it was read.',
		params,
		body: dayPlanInputSchema.extend({ version: versionSchema.nullable() }),
		answer: dayPlanSchema,
		status: 200
	})
};
