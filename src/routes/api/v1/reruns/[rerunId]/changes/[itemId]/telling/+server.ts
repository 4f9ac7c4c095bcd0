import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { tellOfChange } from '$lib/server/services/reruns/changes';

export const POST = endpoint(rerunOperations.tell, ({ person, params, body }) =>
	tellOfChange(person, params, body)
);
