import { REGION_KEYS, REGIONS, sayRegion } from '$lib/format/caution-regions';
import { CAUTIONS } from '$lib/format/cautions';
import { cautionTextFormSchema, fromCautionTextForm, toCautionTextForm } from '$lib/schemas/caution-texts';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { getCautionText, saveCautionText } from '$lib/server/services/caution-texts';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	const text = await orPageError(getCautionText(person));
	return {
		text,
		regions: REGION_KEYS.map((key) => ({ key, label: REGIONS[key].label, says: sayRegion(key).text })),
		ours: CAUTIONS.map(({ id, title, text: words }) => ({ id, title, text: words })),
		form: await loadForm(cautionTextFormSchema, toCautionTextForm(text)),
		isSaved: event.url.searchParams.has('saved')
	};
};

export const actions: Actions = {
	default: (event) =>
		saveEdited(event, {
			action: 'shop.write',
			schema: cautionTextFormSchema,
			save: async (person, form) => {
				await saveCautionText(person, fromCautionTextForm(form));
				return '/shop/cautions?saved';
			},
			newest: async (person) => toCautionTextForm(await getCautionText(person))
		})
};
