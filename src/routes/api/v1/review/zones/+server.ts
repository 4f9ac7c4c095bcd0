import { endpoint } from '$lib/server/http/endpoint';
import { reviewOperations } from '$lib/server/http/operations/review';
import { reviewZones } from '$lib/server/services/review/review-zones';

export const GET = endpoint(reviewOperations.zones, ({ person, query }) => reviewZones(person, query));
