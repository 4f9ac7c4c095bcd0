import { endpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { finishFollowUp } from '$lib/server/services/fittings';

export const POST = endpoint(fittingOperations.finish, ({ person, params, body }) =>
	finishFollowUp(person, params.followUpId, body)
);
