import { guard, orPageError } from '$lib/server/http/guard';
import { listFits } from '$lib/server/services/fits';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.read');
	return { fits: await orPageError(listFits(person)) };
};
