import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { getAssessment } from '$lib/server/services/assessments';
import { logger } from '$lib/server/logger';
import { followOutlook } from '$lib/server/services/outlooks';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how far the outlook of an assessment is; the last event is `done` or `failed`. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'assessments.read');
	const { id } = await orPageError(getAssessment(person, pageId(event.params.assessmentId)));
	const encoder = new TextEncoder();
	let isOpen = true;
	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			const send = (name: string, data: unknown): void => {
				if (isOpen) controller.enqueue(encoder.encode(`event: ${name}\ndata: ${JSON.stringify(data)}\n\n`));
			};
			followOutlook(person, id, (progress) => send('progress', progress))
				.then(() => send('done', {}))
				.catch((error: unknown) => {
					logger.error({ assessmentId: id, err: error }, 'outlook failed');
					send('failed', {});
				})
				.finally(() => {
					if (isOpen) controller.close();
					isOpen = false;
				});
		},
		cancel() {
			isOpen = false;
		}
	});
	return new Response(stream, {
		headers: { 'content-type': 'text/event-stream', 'cache-control': 'no-store' }
	});
};
