import { randomUUID } from 'node:crypto';
import type { Handle, HandleServerError, ServerInit } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import { building } from '$app/environment';
import { CLIENT_ADDRESS_HEADER, handle as handleAuth } from '$lib/server/auth';
import { mustSetUpFactor } from '$lib/server/auth/second-factor';
import { personOfSession, whySessionEnded } from '$lib/server/auth/sessions';
import { boot, shutDown } from '$lib/server/boot';
import { env, isSecureOrigin } from '$lib/server/env';
import { AppError } from '$lib/server/errors';
import { isForged } from '$lib/server/http/csrf';
import { leadToSetUp } from '$lib/server/http/lead-to-set-up';
import { secureHeaders } from '$lib/server/http/headers';
import { problemResponse } from '$lib/server/http/problem';
import { logger } from '$lib/server/logger';

export const init: ServerInit = async () => {
	if (building) return;
	await boot();
	process.once('sveltekit:shutdown', () => {
		shutDown().catch((error: unknown) => logger.error({ err: error }, 'shutdown failed'));
	});
};

/** Paths without sign-in: they must answer while everything else may not. */
const PROBES = new Set(['/healthz', '/readyz']);
/** Sign-in happens in forms of our own; the library's own pages are not served. */
const LIBRARY_PAGES = /^\/auth(\/|$)/;
const OPENED_BY_LINK = /^\/(sheet|sign-in\/(link|invitation)|reminders)(\/|$)/;

const number: Handle = ({ event, resolve }) => {
	event.locals.requestId = randomUUID();
	event.locals.person = null;
	event.locals.sessionId = null;
	event.locals.sessionEnd = null;
	return resolve(event);
};

/** Turns away what no page or endpoint should ever see. */
const refuse: Handle = async ({ event, resolve }) => {
	const { pathname } = event.url;
	const { requestId } = event.locals;
	if (pathname.startsWith('//') || LIBRARY_PAGES.test(pathname)) {
		return new Response('There is no such page.', { status: 404, headers: { 'content-type': 'text/plain' } });
	}
	if (isForged(event.request, env().ORIGIN)) {
		return problemResponse(
			new AppError('not_allowed', 'This request did not come from a page of ours.'),
			requestId
		);
	}
	return resolve(event);
};

const identify: Handle = async ({ event, resolve }) => {
	if (PROBES.has(event.url.pathname)) return resolve(event);
	event.request.headers.set(CLIENT_ADDRESS_HEADER, event.getClientAddress());
	const session = await event.locals.auth();
	const secret = session?.sessionSecret;
	if (secret) {
		event.locals.person = await personOfSession(secret);
		event.locals.sessionId = event.locals.person ? secret : null;
		if (!event.locals.person) event.locals.sessionEnd = await whySessionEnded(secret);
	}
	const { person } = event.locals;
	const led = person && (await mustSetUpFactor(person)) ? leadToSetUp(event) : null;
	return led ?? resolve(event);
};

const protect: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	if (event.url.pathname.startsWith('/api/') && response.status === 404 && isHtml(response)) {
		return problemResponse(
			new AppError('not_found', 'There is nothing at this address.'),
			event.locals.requestId
		);
	}
	if (event.url.pathname.startsWith('/api/') && response.status === 405) {
		return problemResponse(
			new AppError('method_not_allowed', 'This address does not take this method.'),
			event.locals.requestId
		);
	}
	return response;
};

const isHtml = (response: Response): boolean =>
	response.headers.get('content-type')?.startsWith('text/html') ?? false;

const addHeaders: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	secureHeaders(response, { byLink: OPENED_BY_LINK.test(event.url.pathname), secure: isSecureOrigin() });
	return response;
};

export const handle = sequence(number, addHeaders, refuse, handleAuth, identify, protect);

export const handleError: HandleServerError = ({ error, event, status, message }) => {
	const id = event.locals.requestId;
	if (status === 404) return { message: 'There is no such page.', id };
	if (status < 500) return { message, id };
	logger.error({ requestId: id, path: event.url.pathname, err: error }, 'page failed');
	return { message: 'Something went wrong on our side. Nothing was stored.', id };
};
