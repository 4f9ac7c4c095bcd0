import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { moveRerun } from '$lib/server/services/reruns/reruns';

export const PUT = endpoint(rerunOperations.move, ({ person, params, body }) =>
	moveRerun(person, params.rerunId, body)
);
