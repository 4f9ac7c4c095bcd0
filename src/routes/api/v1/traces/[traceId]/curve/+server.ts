import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { getCurve } from '$lib/server/services/trace-views';

export const GET = endpoint(traceOperations.curve, ({ person, params, query }) =>
	getCurve(person, params.traceId, query)
);
