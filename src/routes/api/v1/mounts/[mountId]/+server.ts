import { endpoint } from '$lib/server/http/endpoint';
import { mountOperations } from '$lib/server/http/operations/mounts';
import { getMount, removeMount } from '$lib/server/services/mounts';

export const GET = endpoint(mountOperations.get, ({ person, params }) => getMount(person, params.mountId));

export const DELETE = endpoint(mountOperations.remove, ({ person, params }) =>
	removeMount(person, params.mountId)
);
