import { fromPlaceForm, placeChangeFormSchema, toPlaceForm } from '$lib/schemas/place-form';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getPlace, updatePlace } from '$lib/server/services/places';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'places.read');
	const place = await orPageError(getPlace(person, pageId(event.params.placeId)));
	const form = await loadForm(placeChangeFormSchema, toPlaceForm(place));
	const done = (what: string): boolean => event.url.searchParams.has(what);
	return { place, form, isSaved: done('saved'), isTaken: done('weather'), isPutBack: done('put-back') };
};

export const actions: Actions = {
	default: (event) => {
		const id = pageId(event.params.placeId);
		return saveEdited(event, {
			action: 'places.write',
			schema: placeChangeFormSchema,
			save: async (person, { version, ...form }) => {
				const { id: placeId } = await updatePlace(person, id, { ...fromPlaceForm(form), version });
				return `/places/${placeId}?saved`;
			},
			newest: async (person) => toPlaceForm(await getPlace(person, id))
		});
	}
};
