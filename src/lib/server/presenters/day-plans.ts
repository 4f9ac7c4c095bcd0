import type { DayPlanView } from '$lib/schemas/day-plans';
import type { DayPlan } from '../db/models';

export function presentDayPlan(plan: DayPlan): DayPlanView {
	const { id, jobId, version, name, startHour, startSoc, chargerMaxA, legs } = plan;
	return { id, jobId, version, name, startHour, startSoc, chargerMaxA, legs };
}
