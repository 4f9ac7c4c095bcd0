import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { restoreTrace } from '$lib/server/services/traces';

export const POST = endpoint(traceOperations.restore, ({ person, params }) =>
	restoreTrace(person, params.traceId)
);
