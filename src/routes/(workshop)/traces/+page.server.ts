import { guard, orPageError } from '$lib/server/http/guard';
import { listTraces } from '$lib/server/services/traces';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.read');
	return { traces: await orPageError(listTraces(person)) };
};
