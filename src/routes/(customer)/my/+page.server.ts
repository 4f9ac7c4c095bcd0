import { guard, orPageError } from '$lib/server/http/guard';
import { stopPathOf } from '$lib/server/services/reminder-stops';
import { listMySheets } from '$lib/server/services/sheet-readers';
import { listMyVehicles } from '$lib/server/services/my-vehicles';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'documents.read-own');
	const [sheets, vehicles] = await orPageError(Promise.all([listMySheets(person), listMyVehicles(person)]));
	return {
		...{ sheets, vehicles },
		remindersHref: stopPathOf(person.customerId!)
	};
};
