import { guard, orPageError } from '$lib/server/http/guard';
import { listOwnZones } from '$lib/server/services/review/own-zones';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'review.read');
	const done = (what: string): boolean => event.url.searchParams.has(what);
	return {
		zones: await orPageError(listOwnZones(person)),
		isSaved: done('saved'),
		isRemoved: done('removed')
	};
};
