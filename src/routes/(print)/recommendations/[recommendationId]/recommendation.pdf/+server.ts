import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { answerPdf } from '$lib/server/http/pdf';
import { writeRecommendationPdf } from '$lib/server/services/papers';
import type { RequestHandler } from './$types';

/** The recommendation as a document, the same as its print. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'assessments.read');
	const id = pageId(event.params.recommendationId);
	return answerPdf(await orPageError(writeRecommendationPdf(person, id)), `recommendation-${id}`);
};
