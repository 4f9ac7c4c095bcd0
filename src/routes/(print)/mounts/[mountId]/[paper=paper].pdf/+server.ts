import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { answerPdf } from '$lib/server/http/pdf';
import { writeMountPaper } from '$lib/server/services/papers';
import type { RequestHandler } from './$types';

/** A paper about a fitted mount as a document, the same as its print. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'jobs.read');
	const id = pageId(event.params.mountId);
	const { paper } = event.params;
	return answerPdf(await orPageError(writeMountPaper(person, id, paper)), `${paper}-${id}`);
};
