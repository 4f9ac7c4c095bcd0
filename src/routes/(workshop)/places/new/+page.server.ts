import { idSchema } from '$lib/schemas/fields';
import { fromPlaceForm, placeFormSchema } from '$lib/schemas/place-form';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard } from '$lib/server/http/guard';
import { createPlace } from '$lib/server/services/places';
import type { Actions, PageServerLoad } from './$types';

/** The job that is waiting for this place, if the way here came from one. */
function waitingJob(url: URL): number | null {
	return idSchema.safeParse(url.searchParams.get('job') ?? undefined).data ?? null;
}

export const load: PageServerLoad = async (event) => {
	guard(event, 'places.write');
	return { form: await loadForm(placeFormSchema), jobId: waitingJob(event.url) };
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'places.write',
			schema: placeFormSchema,
			save: async (person, data) => {
				const { id } = await createPlace(person, fromPlaceForm(data));
				const jobId = waitingJob(event.url);
				return jobId === null ? `/places/${id}?saved` : `/jobs/${jobId}/climate?place=${id}`;
			}
		})
};
