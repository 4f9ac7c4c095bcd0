import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { useAsDayPlan } from '$lib/server/services/trace-views';

export const PUT = endpoint(traceOperations.plan, ({ person, params, body }) =>
	useAsDayPlan(person, params.traceId, body)
);
