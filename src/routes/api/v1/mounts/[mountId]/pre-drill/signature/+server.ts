import { endpoint } from '$lib/server/http/endpoint';
import { preDrillOperations } from '$lib/server/http/operations/pre-drill';
import { signPreDrill } from '$lib/server/services/pre-drill';

export const PUT = endpoint(preDrillOperations.sign, ({ person, params, body }) =>
	signPreDrill(person, params.mountId, body)
);
