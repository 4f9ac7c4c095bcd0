import { endpoint } from '$lib/server/http/endpoint';
import { erasureOperations } from '$lib/server/http/operations/erasures';
import { decideErasure } from '$lib/server/services/erasures';

export const POST = endpoint(erasureOperations.decide, ({ person, params, body }) =>
	decideErasure(person, params.erasureId, body)
);
