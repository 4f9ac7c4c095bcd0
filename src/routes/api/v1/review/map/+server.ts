import { endpoint } from '$lib/server/http/endpoint';
import { reviewOperations } from '$lib/server/http/operations/review';
import { reviewMap } from '$lib/server/services/review/review-map';

export const GET = endpoint(reviewOperations.map, ({ person, query }) => reviewMap(person, query));
