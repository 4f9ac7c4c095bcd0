import { endpoint } from '$lib/server/http/endpoint';
import { mountOperations } from '$lib/server/http/operations/mounts';
import { restoreMount } from '$lib/server/services/mounts';

export const POST = endpoint(mountOperations.restore, ({ person, params }) =>
	restoreMount(person, params.mountId)
);
