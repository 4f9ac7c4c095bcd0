import type { HoldsProgress } from '$lib/schemas/accuracy';
import { streamProgress } from '$lib/server/http/event-stream';
import { guard } from '$lib/server/http/guard';
import { logger } from '$lib/server/logger';
import { followHolds } from '$lib/server/services/accuracy/trace-hold';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how many traces are still to be held against what had been predicted of them. */
export const GET: RequestHandler = (event) => {
	const person = guard(event, 'books.read');
	const isOver = () => event.request.signal.aborted;
	return streamProgress<HoldsProgress>(
		(tell) => followHolds(person, tell, isOver),
		(error) => logger.error({ err: error }, 'the holding of traces could not be followed')
	);
};
