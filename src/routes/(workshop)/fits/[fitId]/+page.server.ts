import { redirect } from '@sveltejs/kit';
import { fittedDraftSchema } from '$lib/schemas/fits';
import { doOrSay } from '$lib/server/http/do-or-say';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { mayDo } from '$lib/server/policies';
import { draftFittedBook } from '$lib/server/services/fit-books';
import { cancelFit, getFit } from '$lib/server/services/fits';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.read');
	const fitId = pageId(event.params.fitId);
	const sayTrouble = (error: unknown): void => logger.error({ fitId, err: error }, 'fit failed');
	const fit = await orPageError(getFit(person, fitId, sayTrouble));
	return {
		fit,
		shopName: person.workshopName,
		mayDraft: mayDo(person, 'books.write'),
		draftForm: await loadForm(fittedDraftSchema, { name: fit.name })
	};
};

export const actions: Actions = {
	cancel: async (event) => {
		const fitId = pageId(event.params.fitId);
		// Whose fit it is comes before what is to be done with it.
		await orPageError(getFit(guard(event, 'traces.write'), fitId));
		const answer = await doOrSay(event, 'traces.write', async (person) => {
			await cancelFit(person, fitId);
			return null;
		});
		if (answer) return answer;
		redirect(303, `/fits/${fitId}`);
	},
	draft: async (event) => {
		const fitId = pageId(event.params.fitId);
		await orPageError(getFit(guard(event, 'books.write'), fitId));
		return saveForm(event, {
			action: 'books.write',
			schema: fittedDraftSchema,
			save: async (person, words) => `/books/${(await draftFittedBook(person, fitId, words)).id}`
		});
	}
};
