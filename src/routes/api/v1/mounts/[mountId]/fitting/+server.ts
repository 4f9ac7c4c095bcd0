import { endpoint } from '$lib/server/http/endpoint';
import { fittingOperations } from '$lib/server/http/operations/fittings';
import { getFitting, saveFitting } from '$lib/server/services/fittings';

export const GET = endpoint(fittingOperations.get, ({ person, params }) =>
	getFitting(person, params.mountId)
);

export const PUT = endpoint(fittingOperations.save, ({ person, params, body }) =>
	saveFitting(person, params.mountId, body)
);
