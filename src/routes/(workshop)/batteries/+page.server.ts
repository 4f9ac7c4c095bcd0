import { guard, orPageError } from '$lib/server/http/guard';
import { listBatteries } from '$lib/server/services/batteries';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'batteries.read');
	return { batteries: await orPageError(listBatteries(person)) };
};
