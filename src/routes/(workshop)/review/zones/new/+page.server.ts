import { ownZoneFormSchema } from '$lib/schemas/own-zone-form';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { listPlaces } from '$lib/server/services/places';
import { createOwnZone, listOwnZones } from '$lib/server/services/review/own-zones';
import { readZoneForm, zoneFormFor } from '../save-zone';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'own-zones.write');
	const [zones, places] = await Promise.all([
		orPageError(listOwnZones(person)),
		orPageError(listPlaces(person))
	]);
	const position = Math.max(0, ...zones.map((zone) => zone.position)) + 1;
	return {
		places: places.map(({ name }) => name),
		form: await loadForm(ownZoneFormSchema, { position: Math.min(position, 999) })
	};
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'own-zones.write',
			schema: ownZoneFormSchema,
			schemaFor: zoneFormFor,
			save: async (person, form) => {
				await createOwnZone(person, await readZoneForm(person, form));
				return '/review/zones?saved';
			}
		})
};
