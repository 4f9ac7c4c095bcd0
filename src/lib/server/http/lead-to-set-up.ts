import { redirect, type RequestEvent } from '@sveltejs/kit';
import { AppError } from '../errors';
import { problemResponse } from './problem';

/** What somebody who must set up a second factor may still do: that, and go. */
const OPEN = new Set(['/second-factor', '/sign-out']);
const ASKED = 'Set up your second factor first: the workshop asks managers and engineers for one.';

/** Leads a page to the set-up, and refuses the API until it is done; null where the way is open. */
export function leadToSetUp({ url, locals }: Pick<RequestEvent, 'url' | 'locals'>): Response | null {
	if (OPEN.has(url.pathname)) return null;
	if (!url.pathname.startsWith('/api/')) redirect(303, '/second-factor');
	return problemResponse(new AppError('not_allowed', ASKED), locals.requestId);
}
