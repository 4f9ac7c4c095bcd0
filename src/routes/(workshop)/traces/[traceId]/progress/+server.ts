import { streamProgress } from '$lib/server/http/event-stream';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { followReading } from '$lib/server/services/trace-reading';
import { getTrace } from '$lib/server/services/traces';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how much of a trace has been read, from 0 to 1. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'traces.read');
	const { id } = await orPageError(getTrace(person, pageId(event.params.traceId)));
	return streamProgress<number>(
		(tell) => followReading(person, id, tell),
		(error) => logger.error({ traceId: id, err: error }, 'reading failed')
	);
};
