import type { TraceHold } from '$lib/schemas/accuracy';
import { streamProgress } from '$lib/server/http/event-stream';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { followTraceHold } from '$lib/server/services/accuracy/trace-hold';
import { getTrace } from '$lib/server/services/traces';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how far a trace is in being held against what had been predicted of its day, and at last what came of it. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'traces.read');
	const { id } = await orPageError(getTrace(person, pageId(event.params.traceId)));
	const isOver = () => event.request.signal.aborted;
	return streamProgress<TraceHold | null>(
		(tell) => followTraceHold(person, id, tell, isOver),
		(error) => logger.error({ traceId: id, err: error }, 'the holding of a trace could not be followed')
	);
};
