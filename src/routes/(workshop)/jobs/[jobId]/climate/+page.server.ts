import { idSchema } from '$lib/schemas/fields';
import { jobClimateSchema, type JobView } from '$lib/schemas/jobs';
import type { PlaceView } from '$lib/schemas/places';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
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
	const form = await loadForm(jobClimateSchema, { version: job.version, ...start });
	return { job, places, form };
};

export const actions: Actions = {
	default: (event) => {
		const jobId = pageId(event.params.jobId);
		return saveEdited(event, {
			action: 'jobs.write',
			schema: jobClimateSchema,
			save: async (person, data) => `/jobs/${(await setJobClimate(person, jobId, data)).id}`,
			newest: async (person) => {
				const { version, place, hotDay } = await getJob(person, jobId);
				return { version, placeId: place?.id, ...hotDay };
			}
		});
	}
};
