import { redirect, type RequestEvent } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { doOrSay } from '$lib/server/http/do-or-say';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { listFailedLetters, noteLetterArrived, sendLetterAgain } from '$lib/server/services/sent-letters';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	return {
		letters: await orPageError(listFailedLetters(person)),
		isTriedAgain: event.url.searchParams.has('again')
	};
};

const decideLetter = (event: RequestEvent, decide: typeof sendLetterAgain, next: string) =>
	doOrSay(event, 'shop.write', async (person, sent): Promise<never> => {
		await decide(person, validate(idSchema, sent.get('letterId') ?? undefined));
		redirect(303, next);
	});

export const actions: Actions = {
	again: (event) => decideLetter(event, sendLetterAgain, '/shop/letters?again'),
	arrived: (event) => decideLetter(event, noteLetterArrived, '/shop/letters')
};
