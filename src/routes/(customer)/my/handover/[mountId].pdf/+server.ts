import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { answerPdf } from '$lib/server/http/pdf';
import { writeMyHandover } from '$lib/server/services/papers';
import type { RequestHandler } from './$types';

/** What came with the customer's own battery, as a document. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'documents.read-own');
	const mountId = pageId(event.params.mountId);
	return answerPdf(await orPageError(writeMyHandover(person, mountId)), `handover-${mountId}`);
};
