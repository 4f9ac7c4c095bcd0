import { fail } from '@sveltejs/kit';
import { AppError } from '$lib/server/errors';
import { readByLink, writeByLink } from '$lib/server/http/by-link';
import { readPageForm } from '$lib/server/http/forms';
import { orPageError } from '$lib/server/http/guard';
import { chooseReminders, openReminderChoice } from '$lib/server/services/reminder-stops';
import type { Actions, PageServerLoad } from './$types';

/** To look stops nothing: programs that scan mail open links too. The button does, or the mail program's own. */
export const load: PageServerLoad = (event) =>
	orPageError(readByLink(event, () => openReminderChoice(event.params.stop)));

export const actions: Actions = {
	/** Answers without leading on, as RFC 8058 asks of what a mail program posts. */
	default: async (event) => {
		const isWanted = (await readPageForm(event.request)).has('again');
		try {
			await writeByLink(event, () => chooseReminders(event.params.stop, isWanted));
		} catch (refusal) {
			if (refusal instanceof AppError) return fail(refusal.status, { refusal: refusal.message });
			throw refusal;
		}
		return { isSaved: true };
	}
};
