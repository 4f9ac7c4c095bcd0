import { verdictLetterSchema } from '$lib/schemas/reruns';
import { redirect } from '@sveltejs/kit';
import { doOrSay } from '$lib/server/http/do-or-say';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getChange, tellOfChange } from '$lib/server/services/reruns/changes';
import type { Actions, PageServerLoad } from './$types';

const idsOf = ({ rerunId, itemId }: { rerunId: string; itemId: string }) => ({
	rerunId: pageId(rerunId),
	itemId: pageId(itemId)
});

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'reruns.read');
	const ids = idsOf(event.params);
	const change = await orPageError(getChange(person, ids));
	return { change, rerunId: ids.rerunId, form: await loadForm(verdictLetterSchema, change.draft) };
};

export const actions: Actions = {
	letter: (event) => {
		const ids = idsOf(event.params);
		return saveForm(event, {
			action: 'reruns.write',
			schema: verdictLetterSchema,
			save: async (person, letter) => {
				await tellOfChange(person, ids, { how: 'letter', ...letter });
				return `/reruns/${ids.rerunId}/${ids.itemId}`;
			}
		});
	},
	otherwise: (event) => {
		const ids = idsOf(event.params);
		return doOrSay(event, 'reruns.write', async (person) => {
			await tellOfChange(person, ids, { how: 'otherwise' });
			redirect(303, `/reruns/${ids.rerunId}/${ids.itemId}`);
		});
	}
};
