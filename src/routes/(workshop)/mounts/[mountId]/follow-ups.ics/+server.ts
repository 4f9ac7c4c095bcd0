import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { writeCalendar } from '$lib/server/services/follow-up-calendar';
import type { RequestHandler } from './$types';

/** The dates of the follow-ups, for anybody's calendar. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'jobs.read');
	const mountId = pageId(event.params.mountId);
	const text = await orPageError(writeCalendar(person, mountId));
	return new Response(text, {
		headers: {
			'content-type': 'text/calendar; charset=utf-8',
			'content-disposition': `attachment; filename="follow-ups-${mountId}.ics"`
		}
	});
};
