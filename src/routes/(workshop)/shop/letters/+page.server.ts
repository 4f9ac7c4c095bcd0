import { fail, redirect } from '@sveltejs/kit';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { listFailedLetters, sendLetterAgain } from '$lib/server/services/sent-letters';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'shop.write');
	return {
		letters: await orPageError(listFailedLetters(person)),
		isTriedAgain: event.url.searchParams.has('again')
	};
};

export const actions: Actions = {
	again: async (event) => {
		const person = guard(event, 'shop.write');
		const letterId = pageId(String((await readPageForm(event.request)).get('letterId') ?? ''));
		try {
			await sendLetterAgain(person, letterId);
		} catch (error) {
			if (error instanceof AppError) return fail(error.status, { refusal: error.message });
			throw error;
		}
		redirect(303, '/shop/letters?again');
	}
};
