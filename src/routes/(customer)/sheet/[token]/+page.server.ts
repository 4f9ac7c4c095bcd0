import { fail, redirect } from '@sveltejs/kit';
import { acknowledgeSchema } from '$lib/schemas/sheets';
import { readByLink, writeByLink } from '$lib/server/http/by-link';
import { readForm, readPageForm, refuseForm } from '$lib/server/http/forms';
import { orPageError } from '$lib/server/http/guard';
import { acknowledgeSheet, openSheet } from '$lib/server/services/sheet-readers';
import { showSheet } from '../../show-sheet';
import type { Actions, PageServerLoad } from './$types';

/** Whoever holds the link may read; nobody signs in here. */
export const load: PageServerLoad = async (event) =>
	showSheet(await orPageError(readByLink(event, () => openSheet(event.params.token))));

export const actions: Actions = {
	default: async (event) => {
		const { token } = event.params;
		const { form, data } = await readForm(await readPageForm(event.request), acknowledgeSchema);
		if (data === null) return fail(422, { form });
		try {
			await writeByLink(event, () => acknowledgeSheet(token, data));
		} catch (error) {
			return refuseForm(form, error);
		}
		redirect(303, `/sheet/${token}#acknowledged`);
	}
};
