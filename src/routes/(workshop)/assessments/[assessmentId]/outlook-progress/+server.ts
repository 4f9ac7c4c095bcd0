import type { OutlookProgress } from '$lib/thermal/outlook';
import { streamProgress } from '$lib/server/http/event-stream';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getAssessment } from '$lib/server/services/assessments';
import { logger } from '$lib/server/logger';
import { followOutlook } from '$lib/server/services/outlooks';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how far the outlook of an assessment is. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'assessments.read');
	const { id } = await orPageError(getAssessment(person, pageId(event.params.assessmentId)));
	return streamProgress<OutlookProgress>(
		(tell) => followOutlook(person, id, tell),
		(error) => logger.error({ assessmentId: id, err: error }, 'outlook failed')
	);
};
