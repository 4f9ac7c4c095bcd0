import { endpoint } from '$lib/server/http/endpoint';
import { mountOperations } from '$lib/server/http/operations/mounts';
import { saveCable } from '$lib/server/services/mounts';

export const PUT = endpoint(mountOperations.cable, ({ person, params, body }) =>
	saveCable(person, params.mountId, body)
);
