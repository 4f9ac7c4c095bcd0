import { redirect } from '@sveltejs/kit';
import { ownZoneFormSchema, toOwnZoneForm } from '$lib/schemas/own-zone-form';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { listPlaces } from '$lib/server/services/places';
import { getOwnZone, removeOwnZone, updateOwnZone } from '$lib/server/services/review/own-zones';
import { readZoneForm, zoneFormFor } from '../save-zone';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'own-zones.write');
	const zone = await orPageError(getOwnZone(person, pageId(event.params.zoneId)));
	const places = await orPageError(listPlaces(person));
	return {
		zone,
		places: places.map(({ name }) => name),
		form: await loadForm(ownZoneFormSchema, toOwnZoneForm(zone, places))
	};
};

export const actions: Actions = {
	save: (event) => {
		const id = pageId(event.params.zoneId);
		return saveEdited(event, {
			action: 'own-zones.write',
			schema: ownZoneFormSchema,
			schemaFor: zoneFormFor,
			save: async (person, form) => {
				await getOwnZone(person, id);
				await updateOwnZone(person, id, {
					...(await readZoneForm(person, form)),
					version: Number(form.version)
				});
				return '/review/zones?saved';
			},
			newest: async (person) => toOwnZoneForm(await getOwnZone(person, id), await listPlaces(person))
		});
	},
	remove: async (event) => {
		const person = guard(event, 'own-zones.write');
		await orPageError(removeOwnZone(person, pageId(event.params.zoneId)));
		redirect(303, '/review/zones?removed');
	}
};
