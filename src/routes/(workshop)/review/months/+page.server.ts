import { renderTrendsSvg } from '$lib/components/charts/review-trends/render-trends';
import { reviewScopeSchema } from '$lib/schemas/review';
import { guard, orPageError } from '$lib/server/http/guard';
import { readPageQuery } from '$lib/server/http/page-query';
import { nameScope } from '$lib/server/services/review/name-scope';
import { reviewTrends } from '$lib/server/services/review/review-trends';
import { listZones } from '$lib/server/services/review/review-zones';
import type { PageServerLoad } from './$types';

const LABEL =
	'Month by month: dark days predicted as a dashed line, reported as dots; below, how many were fitted.';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'review.read');
	const { query, leftOut } = readPageQuery(reviewScopeSchema, event.url);
	const [trends, zones, names] = await Promise.all([
		orPageError(reviewTrends(person, query)),
		orPageError(listZones(person, query.kind)),
		orPageError(nameScope(person, query))
	]);
	const picture = {
		phone: renderTrendsSvg(trends, LABEL, 'phone'),
		desk: renderTrendsSvg(trends, LABEL, 'desk')
	};
	return { query, leftOut, trends, ...zones, names, picture };
};
