import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { listChanges } from '$lib/server/services/reruns/changes';

export const GET = endpoint(rerunOperations.changes, ({ person, params, query }) =>
	listChanges(person, params.rerunId, query.page)
);
