import { fromRemedyForm, remedyFormSchema, toRemedyForm } from '$lib/schemas/remedy-form';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { mayDo } from '$lib/server/policies';
import { getRemedyList, saveRemedyList } from '$lib/server/services/remedy-lists';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'remedies.read');
	const list = await orPageError(getRemedyList(person));
	return {
		list,
		form: await loadForm(remedyFormSchema, toRemedyForm(list)),
		mayEdit: mayDo(person, 'remedies.write'),
		isSaved: event.url.searchParams.has('saved')
	};
};

export const actions: Actions = {
	default: (event) =>
		saveEdited(event, {
			action: 'remedies.write',
			schema: remedyFormSchema,
			save: async (person, form) => {
				await saveRemedyList(person, fromRemedyForm(form));
				return '/remedies?saved';
			},
			newest: async (person) => toRemedyForm(await getRemedyList(person))
		})
};
