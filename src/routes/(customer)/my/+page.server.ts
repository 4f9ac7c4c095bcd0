import { guard, orPageError } from '$lib/server/http/guard';
import { stopPathOf } from '$lib/server/services/reminder-stops';
import { listMySheets } from '$lib/server/services/sheet-readers';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'documents.read-own');
	return {
		sheets: await orPageError(listMySheets(person)),
		remindersHref: stopPathOf(person.customerId!)
	};
};
