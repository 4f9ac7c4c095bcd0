import { guard, orPageError } from '$lib/server/http/guard';
import { getLetter } from '$lib/server/services/mailbox';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mailbox.read');
	return { letter: await orPageError(getLetter(person, event.params.messageId)) };
};
