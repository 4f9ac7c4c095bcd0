import { endpoint } from '$lib/server/http/endpoint';
import { reviewOperations } from '$lib/server/http/operations/review';
import { listInstallations } from '$lib/server/services/review/review-list';

export const GET = endpoint(reviewOperations.installations, ({ person, query }) =>
	listInstallations(person, query)
);
