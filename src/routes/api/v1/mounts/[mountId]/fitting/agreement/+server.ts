import { endpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { holdFitting } from '$lib/server/services/fitting-agreement';

export const PUT = endpoint(fittingOperations.hold, ({ person, params, body }) =>
	holdFitting(person, params.mountId, body)
);
