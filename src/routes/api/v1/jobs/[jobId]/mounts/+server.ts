import { endpoint } from '$lib/server/http/endpoint';
import { mountOperations } from '$lib/server/http/operations/mounts';
import { addMount, listMounts } from '$lib/server/services/mounts';

export const GET = endpoint(mountOperations.list, async ({ person, params }) => ({
	rows: await listMounts(person, params.jobId)
}));

export const POST = endpoint(mountOperations.add, ({ person, params, body }) =>
	addMount(person, params.jobId, body)
);
