import { endpoint } from '$lib/server/http/endpoint';
import { accuracyOperations } from '$lib/server/http/operations/accuracy';
import { listReadings } from '$lib/server/services/accuracy/list-readings';

export const GET = endpoint(accuracyOperations.readings, ({ person, query }) => listReadings(person, query));
