import { error } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { acknowledgeSchema } from '$lib/schemas/sheets';
import { saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { acknowledgeMySheet, getMySheet } from '$lib/server/services/sheet-readers';
import { showSheet } from '../../show-sheet';
import type { Actions, PageServerLoad } from './$types';

function readSheetId(text: string): number {
	return idSchema.safeParse(text).data ?? error(404, { message: 'There is no such page here.' });
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'documents.read-own');
	return showSheet(await orPageError(getMySheet(person, readSheetId(event.params.sheetId))));
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'documents.read-own',
			schema: acknowledgeSchema,
			save: async (person, data) => {
				const sheetId = readSheetId(event.params.sheetId);
				await acknowledgeMySheet(person, sheetId, data);
				return `/my/${sheetId}#acknowledged`;
			}
		})
};
