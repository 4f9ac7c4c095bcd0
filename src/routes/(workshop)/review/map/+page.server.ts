import { reviewFilterSchema } from '$lib/schemas/review';
import { guard, orPageError } from '$lib/server/http/guard';
import { readPageQuery } from '$lib/server/http/page-query';
import { drawReviewMap } from '$lib/server/presenters/review-map';
import { reviewMap } from '$lib/server/services/review/review-map';
import { listZones } from '$lib/server/services/review/review-zones';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'review.read');
	const { query, leftOut } = readPageQuery(reviewFilterSchema, event.url);
	const [map, { on }] = await Promise.all([
		orPageError(reviewMap(person, query)),
		orPageError(listZones(person, query.kind))
	]);
	return {
		query,
		leftOut,
		map,
		on,
		drawings: { phone: drawReviewMap(map.places, 'phone'), desk: drawReviewMap(map.places, 'desk') }
	};
};
