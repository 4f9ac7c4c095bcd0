import { idSchema } from '$lib/schemas/fields';
import { fromJobClimateForm, jobClimateFormSchema, toDaysOnRoadBoxes } from '$lib/schemas/job-climate-form';
import type { JobView } from '$lib/schemas/jobs';
import { monthBoxes } from '$lib/schemas/months';
import type { PlaceView } from '$lib/schemas/places';
import { saveEdited } from '$lib/server/http/edit-form';
import { fillForm, loadForm, readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getJob, setJobClimate } from '$lib/server/services/jobs';
import { listPlaces } from '$lib/server/services/places';
import type { Actions, PageServerLoad } from './$types';

const hotDayOf = ({ hotDayMaxC, dailyRangeK, sunPeakWPerM2 }: NonNullable<JobView['hotDay']>) => ({
	...{ hotDayMaxC, dailyRangeK, sunPeakWPerM2 }
});

/** What stands in the boxes: the figures of a place that was just chosen, else the job's own. */
function startFrom(job: JobView, places: PlaceView[], url: URL) {
	const asked = idSchema.safeParse(url.searchParams.get('place') ?? undefined).data;
	const place = places.find(({ id }) => id === asked);
	if (place) return { placeId: place.id, ...hotDayOf(place) };
	return job.place ? { placeId: job.place.id, ...hotDayOf(job.hotDay ?? job.place) } : {};
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.write');
	const [job, places] = await orPageError(
		Promise.all([getJob(person, pageId(event.params.jobId)), listPlaces(person)])
	);
	const start = startFrom(job, places, event.url);
	const days = toDaysOnRoadBoxes(job.daysOnRoad);
	const form = await loadForm(jobClimateFormSchema, { version: job.version, ...days, ...start });
	return { job, places, form };
};

/** The row of days with the same number in each, which the page then shows; nothing is saved. */
async function fillDays(formData: FormData) {
	const every = String(formData.get('sameEvery') ?? '').trim();
	const boxes = Object.fromEntries(monthBoxes('daysOnRoad').map(({ box }) => [box, every]));
	return { form: await fillForm(formData, jobClimateFormSchema, boxes), every };
}

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'jobs.write');
		const jobId = pageId(event.params.jobId);
		const formData = await readPageForm(event.request.clone());
		if (formData.has('fill')) {
			await orPageError(getJob(person, jobId));
			return fillDays(formData);
		}
		return saveEdited(event, {
			action: 'jobs.write',
			schema: jobClimateFormSchema,
			save: async (by, data) => `/jobs/${(await setJobClimate(by, jobId, fromJobClimateForm(data))).id}`,
			newest: async (by) => {
				const { version, place, hotDay, daysOnRoad } = await getJob(by, jobId);
				return { version, placeId: place?.id, ...hotDay, ...toDaysOnRoadBoxes(daysOnRoad) };
			}
		});
	}
};
