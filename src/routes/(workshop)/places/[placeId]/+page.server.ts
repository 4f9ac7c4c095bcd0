import { versionSchema } from '$lib/schemas/fields';
import { placeInputSchema } from '$lib/schemas/places';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getPlace, updatePlace } from '$lib/server/services/places';
import type { Actions, PageServerLoad } from './$types';

const changeSchema = placeInputSchema.extend({ version: versionSchema });

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'places.read');
	const place = await orPageError(getPlace(person, pageId(event.params.placeId)));
	return { place, form: await loadForm(changeSchema, place), isSaved: event.url.searchParams.has('saved') };
};

export const actions: Actions = {
	default: (event) => {
		const id = pageId(event.params.placeId);
		return saveEdited(event, {
			action: 'places.write',
			schema: changeSchema,
			save: async (person, data) => `/places/${(await updatePlace(person, id, data)).id}?saved`,
			newest: (person) => getPlace(person, id)
		});
	}
};
