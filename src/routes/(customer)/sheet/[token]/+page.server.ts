import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import { askSchema } from '$lib/schemas/questions';
import { acknowledgeSchema } from '$lib/schemas/sheets';
import { readByLink, writeByLink } from '$lib/server/http/by-link';
import { onceKeyOf, readForm, readPageForm, refuseForm, type Deed } from '$lib/server/http/forms';
import { orPageError } from '$lib/server/http/guard';
import { askByLink } from '$lib/server/services/questions';
import { acknowledgeSheet, openSheet } from '$lib/server/services/sheet-readers';
import { isQuestion, sendOneOfTwo } from '../../both-forms';
import { showSheet } from '../../show-sheet';
import type { Actions, PageServerLoad, RequestEvent as Event } from './$types';

/** Whoever holds the link may read; nobody signs in here. */
export const load: PageServerLoad = async (event) =>
	showSheet(await orPageError(readByLink(event, () => openSheet(event.params.token))));

/** What somebody sends through the link: read, done, and shown where it stands now. */
async function sendByLink<S extends z.ZodObject>(
	event: RequestEvent,
	{ schema, ...deed }: Deed & { schema: S },
	place: string,
	save: (data: z.output<S>, onceKey: string | null) => Promise<unknown>
) {
	const formData = await readPageForm(event.request);
	const { form, data } = await readForm(formData, schema);
	if (data === null) return fail(422, { form });
	try {
		await writeByLink(event, () => save(data, onceKeyOf(event, formData, { ...deed, schema })));
	} catch (error) {
		return refuseForm(form, error);
	}
	redirect(303, `${event.url.pathname}#${place}`);
}

const acknowledge = (event: Event) =>
	sendOneOfTwo(event, 'acknowledge', () =>
		sendByLink(event, { name: 'acknowledge', schema: acknowledgeSchema }, 'acknowledged', (data) =>
			acknowledgeSheet(event.params.token, data)
		)
	);
const ask = (event: Event) =>
	sendOneOfTwo(event, 'ask', () =>
		sendByLink(event, { name: 'ask', schema: askSchema }, 'questions', (data, onceKey) =>
			askByLink(event.params.token, data, onceKey)
		)
	);

export const actions: Actions = {
	acknowledge,
	ask,
	send: async (event) => ((await isQuestion(event)) ? ask(event) : acknowledge(event))
};
