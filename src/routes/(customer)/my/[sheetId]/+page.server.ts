import { error } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { askSchema } from '$lib/schemas/questions';
import { acknowledgeSchema } from '$lib/schemas/sheets';
import { saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { askOnMySheet } from '$lib/server/services/questions';
import { acknowledgeMySheet, getMySheet } from '$lib/server/services/sheet-readers';
import { isQuestion, sendOneOfTwo } from '../../both-forms';
import { showSheet } from '../../show-sheet';
import type { Actions, PageServerLoad, RequestEvent } from './$types';

function readSheetId(text: string): number {
	return idSchema.safeParse(text).data ?? error(404, { message: 'There is no such page here.' });
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'documents.read-own');
	const sheet = await orPageError(getMySheet(person, readSheetId(event.params.sheetId)));
	return showSheet(sheet, person.name);
};

const acknowledge = (event: RequestEvent) =>
	sendOneOfTwo(event, 'acknowledge', () =>
		saveForm(event, {
			action: 'documents.read-own',
			schema: acknowledgeSchema,
			does: 'acknowledge',
			save: async (person, data) => {
				const sheetId = readSheetId(event.params.sheetId);
				await acknowledgeMySheet(person, sheetId, data);
				return `/my/${sheetId}#acknowledged`;
			}
		})
	);
const ask = (event: RequestEvent) =>
	sendOneOfTwo(event, 'ask', () =>
		saveForm(event, {
			action: 'questions.ask',
			schema: askSchema,
			does: 'ask',
			save: async (person, data) => {
				const sheetId = readSheetId(event.params.sheetId);
				await askOnMySheet(person, sheetId, data);
				return `/my/${sheetId}#questions`;
			}
		})
	);

export const actions: Actions = {
	acknowledge,
	ask,
	send: async (event) => ((await isQuestion(event)) ? ask(event) : acknowledge(event))
};
