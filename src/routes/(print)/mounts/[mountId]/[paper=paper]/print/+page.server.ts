import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getMountPaper } from '$lib/server/services/papers';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const mountId = pageId(event.params.mountId);
	const { paper: name } = event.params;
	return { mountId, name, paper: await orPageError(getMountPaper(person, mountId, name)) };
};
