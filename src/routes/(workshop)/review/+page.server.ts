import { reviewFilterSchema } from '$lib/schemas/review';
import { guard, orPageError } from '$lib/server/http/guard';
import { readPageQuery } from '$lib/server/http/page-query';
import { reviewZones } from '$lib/server/services/review/review-zones';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'review.read');
	const { query, leftOut } = readPageQuery(reviewFilterSchema, event.url);
	return { query, leftOut, review: await orPageError(reviewZones(person, query)) };
};
