import { endpoint } from '$lib/server/http/endpoint';
import { reviewOperations } from '$lib/server/http/operations/review';
import { reviewTrends } from '$lib/server/services/review/review-trends';

export const GET = endpoint(reviewOperations.trends, ({ person, query }) => reviewTrends(person, query));
