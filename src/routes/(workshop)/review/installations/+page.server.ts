import { reviewListQuerySchema } from '$lib/schemas/review';
import { guard, orPageError } from '$lib/server/http/guard';
import { readPageQuery } from '$lib/server/http/page-query';
import { nameScope } from '$lib/server/services/review/name-scope';
import { listInstallations } from '$lib/server/services/review/review-list';
import { listZones } from '$lib/server/services/review/review-zones';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'review.read');
	const { query, leftOut } = readPageQuery(reviewListQuerySchema, event.url);
	const [page, zones, names] = await Promise.all([
		orPageError(listInstallations(person, query)),
		orPageError(listZones(person, query.kind)),
		orPageError(nameScope(person, query))
	]);
	return { query, leftOut, page, ...zones, names };
};
