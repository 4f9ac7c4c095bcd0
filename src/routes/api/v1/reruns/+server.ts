import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { listReruns } from '$lib/server/services/reruns/reruns';

export const GET = endpoint(rerunOperations.list, async ({ person }) => ({ rows: await listReruns(person) }));
