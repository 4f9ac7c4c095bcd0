import { redirect } from '@sveltejs/kit';
import {
	NOT_THESE_YEARS,
	retentionInputSchema,
	RETENTION_YEARS,
	type RetentionView
} from '$lib/schemas/retention';
import { doOrSay } from '$lib/server/http/do-or-say';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { getRetention, saveRetention } from '$lib/server/services/retention';
import type { Actions, PageServerLoad } from './$types';

/** "5" as a number of years that can be chosen, "none" as no limit; anything else is nothing that was asked. */
function readYears(text: FormDataEntryValue | null): RetentionView['years'] | undefined {
	if (text === 'none') return null;
	return RETENTION_YEARS.find((years) => String(years) === text);
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	const written = event.url.searchParams.get('years');
	const asked = readYears(written);
	return {
		problem: written && asked === undefined ? NOT_THESE_YEARS : null,
		retention: await orPageError(getRetention(person, asked)),
		choices: [...RETENTION_YEARS],
		isSaved: event.url.searchParams.has('saved')
	};
};

export const actions: Actions = {
	default: (event) =>
		doOrSay(event, 'shop.write', async (person, sent) => {
			const input = { years: readYears(sent.get('years')), version: sent.get('version') ?? undefined };
			await saveRetention(person, validate(retentionInputSchema, input));
			redirect(303, '/shop/retention?saved');
		})
};
