import { guard, orPageError } from '$lib/server/http/guard';
import { listReruns } from '$lib/server/services/reruns/reruns';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'reruns.read');
	return { reruns: await orPageError(listReruns(person)) };
};
