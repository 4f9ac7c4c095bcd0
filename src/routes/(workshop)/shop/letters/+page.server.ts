import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
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

async function decideLetter(event: RequestEvent, decide: typeof sendLetterAgain, next: string) {
	const person = guard(event, 'shop.write');
	const sent = await readPageForm(event.request);
	try {
		await decide(person, validate(idSchema, sent.get('letterId') ?? undefined));
	} catch (error) {
		if (error instanceof AppError) return fail(error.status, { refusal: error.message });
		throw error;
	}
	redirect(303, next);
}

export const actions: Actions = {
	again: (event) => decideLetter(event, sendLetterAgain, '/shop/letters?again'),
	arrived: (event) => decideLetter(event, noteLetterArrived, '/shop/letters')
};
