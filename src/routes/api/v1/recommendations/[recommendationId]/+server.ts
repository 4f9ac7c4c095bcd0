import { endpoint } from '$lib/server/http/endpoint';
import { recommendationOperations } from '$lib/server/http/operations/recommendations';
import { getRecommendation } from '$lib/server/services/recommendations';

export const GET = endpoint(recommendationOperations.get, ({ person, params }) =>
	getRecommendation(person, params.recommendationId)
);
