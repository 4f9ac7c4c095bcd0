import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { listLeft } from '$lib/server/services/reruns/changes';

export const GET = endpoint(rerunOperations.left, async ({ person, params }) => ({
	rows: await listLeft(person, params.rerunId)
}));
