import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { getLegs, saveLegs } from '$lib/server/services/trace-views';

export const GET = endpoint(traceOperations.legs, ({ person, params }) => getLegs(person, params.traceId));

export const PUT = endpoint(traceOperations.setLegs, ({ person, params, body }) =>
	saveLegs(person, params.traceId, body)
);
