import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { answerPdf } from '$lib/server/http/pdf';
import { writeMyRecommendation } from '$lib/server/services/papers';
import type { RequestHandler } from './$types';

/** What the customer was recommended, as a document. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'documents.read-own');
	const id = pageId(event.params.recommendationId);
	return answerPdf(await orPageError(writeMyRecommendation(person, id)), `recommendation-${id}`);
};
