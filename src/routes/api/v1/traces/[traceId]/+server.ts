import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { logger } from '$lib/server/logger';
import { beginReading } from '$lib/server/services/trace-reading';
import { removeTrace } from '$lib/server/services/traces';

/** A reading that was broken off with the application goes on when somebody asks. */
export const GET = endpoint(traceOperations.get, ({ person, params: { traceId } }) =>
	beginReading(person, traceId, (error) => logger.error({ traceId, err: error }, 'reading failed'))
);

export const DELETE = endpoint(traceOperations.remove, ({ person, params }) =>
	removeTrace(person, params.traceId)
);
