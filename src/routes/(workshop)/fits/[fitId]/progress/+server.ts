import { streamProgress } from '$lib/server/http/event-stream';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { logger } from '$lib/server/logger';
import { followFit, getFit } from '$lib/server/services/fits';
import type { RequestHandler } from './$types';

/** Tells, as it goes, how far a fit is, from 0 to 1. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'traces.read');
	const sayTrouble = (error: unknown): void => logger.error({ err: error }, 'fit failed');
	const { id } = await orPageError(getFit(person, pageId(event.params.fitId), sayTrouble));
	return streamProgress<number>((tell) => followFit(person, id, tell), sayTrouble);
};
