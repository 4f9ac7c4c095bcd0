import type { DayPlanInput } from '$lib/schemas/day-plans';
import type { JobView } from '$lib/schemas/jobs';
import type { PreviewBase } from '$lib/schemas/preview';

/** What a live curve needs of a job besides the survey, or what the job still lacks for it. */
export interface PreviewView {
	base: PreviewBase | null;
	dayPlan: DayPlanInput | null;
	missing: { words: string; href: string }[];
}

function listMissing({ id, battery, place }: JobView): PreviewView['missing'] {
	return [
		...(battery ? [] : [{ words: 'Choose the battery', href: `/jobs/${id}/battery` }]),
		...(place ? [] : [{ words: 'Choose the place and its hot day', href: `/jobs/${id}/climate` }])
	];
}

const DAY_MISSING = (jobId: number) => ({ words: 'Plan the day', href: `/jobs/${jobId}/day` });

export function presentPreview(job: JobView, coefficientsAt: PreviewBase['coefficientsAt']): PreviewView {
	const { vehicle, battery, place, hotDay, dayPlan } = job;
	const missing = [...listMissing(job), ...(dayPlan ? [] : [DAY_MISSING(job.id)])];
	if (!battery || !place) return { base: null, dayPlan, missing };
	const { altitudeM } = place;
	return { base: { vehicle, battery, hotDay: hotDay ?? place, altitudeM, coefficientsAt }, dayPlan, missing };
}
