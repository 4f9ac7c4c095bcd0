import { endpoint } from '$lib/server/http/endpoint';
import { rerunOperations } from '$lib/server/http/operations/reruns';
import { getRerun } from '$lib/server/services/reruns/reruns';

export const GET = endpoint(rerunOperations.get, ({ person, params }) => getRerun(person, params.rerunId));
