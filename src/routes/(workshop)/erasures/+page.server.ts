import { erasureFormSchema } from '$lib/schemas/erasures';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { decideErasure, listErasures } from '$lib/server/services/erasures';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'erasures.decide');
	const rows = await orPageError(listErasures(person));
	const waiting = rows.filter(({ state }) => state === 'asked');
	const asked = event.url.searchParams.get('request');
	const chosen = waiting.find(({ id }) => String(id) === asked) ?? waiting[0] ?? null;
	const known = chosen ? { erasureId: chosen.id, version: chosen.version } : {};
	const done = event.url.searchParams.get('done');
	return { rows, chosen, done, form: await loadForm(erasureFormSchema, known) };
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'erasures.decide',
			schema: erasureFormSchema,
			save: async (person, { erasureId, ...decision }) => {
				const { state, letter } = await decideErasure(person, erasureId, decision);
				return `/erasures?done=${state}${letter ? '' : '-untold'}`;
			}
		})
};
