import type { RerunProgress } from '$lib/schemas/reruns';
import { streamProgress } from '$lib/server/http/event-stream';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { followRerun, getRerun } from '$lib/server/services/reruns/reruns';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how far a re-run is. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'reruns.read');
	const { id } = await orPageError(getRerun(person, pageId(event.params.rerunId)));
	const isOver = () => event.request.signal.aborted;
	return streamProgress<RerunProgress>(
		(tell) => followRerun(person, id, tell, isOver),
		(error) => logger.error({ rerunId: id, err: error }, 'a re-run could not be followed')
	);
};
