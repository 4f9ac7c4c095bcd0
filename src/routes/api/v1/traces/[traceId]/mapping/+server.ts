import { endpoint } from '$lib/server/http/endpoint';
import { traceOperations } from '$lib/server/http/operations/traces';
import { logger } from '$lib/server/logger';
import { beginReading } from '$lib/server/services/trace-reading';
import { confirmMapping } from '$lib/server/services/traces';

export const PUT = endpoint(traceOperations.read, async ({ person, params: { traceId }, body }) => {
	await confirmMapping(person, traceId, body);
	return beginReading(person, traceId, (error) => logger.error({ traceId, err: error }, 'reading failed'));
});
