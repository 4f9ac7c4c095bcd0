import { endpoint } from '$lib/server/http/endpoint';
import { preDrillOperations } from '$lib/server/http/operations/pre-drill';
import { getPreDrill, savePreDrill } from '$lib/server/services/pre-drill';

export const GET = endpoint(preDrillOperations.get, ({ person, params }) =>
	getPreDrill(person, params.mountId)
);

export const PUT = endpoint(preDrillOperations.save, ({ person, params, body }) =>
	savePreDrill(person, params.mountId, body)
);
