import { endpoint } from '$lib/server/http/endpoint';
import { dayPlanOperations } from '$lib/server/http/operations/day-plans';
import { getDayPlan, saveDayPlan } from '$lib/server/services/day-plans';

export const GET = endpoint(dayPlanOperations.get, async ({ person, params }) => ({
	dayPlan: await getDayPlan(person, params.jobId)
}));

export const PUT = endpoint(dayPlanOperations.save, ({ person, params, body }) =>
	saveDayPlan(person, params.jobId, body)
);
