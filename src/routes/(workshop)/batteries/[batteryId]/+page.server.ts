import { batteryChangeSchema } from '$lib/schemas/batteries';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { redrawOr } from '$lib/server/http/redraw-form';
import { pageId } from '$lib/server/http/page-id';
import { getBattery, updateBattery } from '$lib/server/services/batteries';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'batteries.read');
	const battery = await orPageError(getBattery(person, pageId(event.params.batteryId)));
	const form = await loadForm(batteryChangeSchema, battery);
	return { battery, form, isSaved: event.url.searchParams.has('saved') };
};

const FORM = { action: 'batteries.write', schema: batteryChangeSchema } as const;

export const actions: Actions = {
	default: (event) => {
		const id = pageId(event.params.batteryId);
		return redrawOr(event, FORM, () =>
			saveEdited(event, {
				...FORM,
				save: async (person, data) => `/batteries/${(await updateBattery(person, id, data)).id}?saved`,
				newest: (person) => getBattery(person, id)
			})
		);
	}
};
