import { askErasureSchema } from '$lib/schemas/erasures';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { askErasure, getMyErasure } from '$lib/server/services/erasures';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'erasures.ask');
	return {
		erasure: await orPageError(getMyErasure(person)),
		isJustAsked: event.url.searchParams.has('asked'),
		form: await loadForm(askErasureSchema)
	};
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'erasures.ask',
			schema: askErasureSchema,
			save: async (person) => {
				await askErasure(person);
				return '/my/data?asked#deletion';
			}
		})
};
