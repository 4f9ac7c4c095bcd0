import { fail, redirect } from '@sveltejs/kit';
import { askErasureSchema } from '$lib/schemas/erasures';
import { AppError } from '$lib/server/errors';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { askErasure, getMyErasure, withdrawErasure } from '$lib/server/services/erasures';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'erasures.ask');
	return {
		erasure: await orPageError(getMyErasure(person)),
		isJustWithdrawn: event.url.searchParams.has('withdrawn'),
		isJustAsked: event.url.searchParams.has('asked'),
		form: await loadForm(askErasureSchema)
	};
};

export const actions: Actions = {
	ask: (event) =>
		saveForm(event, {
			action: 'erasures.ask',
			schema: askErasureSchema,
			save: async (person) => {
				await askErasure(person);
				return '/my/data?asked#deletion';
			}
		}),
	withdraw: async (event) => {
		const person = guard(event, 'erasures.withdraw');
		try {
			await withdrawErasure(person);
		} catch (refusal) {
			if (!(refusal instanceof AppError)) throw refusal;
			return fail(refusal.status, { refusal: refusal.message });
		}
		redirect(303, '/my/data?withdrawn#deletion');
	}
};
