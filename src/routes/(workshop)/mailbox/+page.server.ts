import { guard, orPageError } from '$lib/server/http/guard';
import { mayDo } from '$lib/server/policies';
import { listLetters } from '$lib/server/services/mailbox';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mailbox.read');
	return {
		letters: await orPageError(listLetters(person)),
		isManager: mayDo(person, 'people.write')
	};
};
