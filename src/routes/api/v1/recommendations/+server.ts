import { endpoint } from '$lib/server/http/endpoint';
import { recommendationOperations } from '$lib/server/http/operations/recommendations';
import { makeRecommendation } from '$lib/server/services/recommendations';

export const POST = endpoint(recommendationOperations.create, ({ person, body }) =>
	makeRecommendation(person, body)
);
