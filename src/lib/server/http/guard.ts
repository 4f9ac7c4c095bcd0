import { error, redirect, type RequestEvent } from '@sveltejs/kit';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import { allow, type Action } from '../policies';

type Guarded = Pick<RequestEvent, 'locals' | 'url'>;

/** First step of every page and form: who is not signed in goes to the sign-in page, who may not gets a 403. */
export function guard({ locals, url }: Guarded, action: Action): SignedInPerson {
	if (locals.person === null) {
		const back = url.pathname === '/' ? '' : `?to=${encodeURIComponent(url.pathname + url.search)}`;
		redirect(303, `/sign-in${back}`);
	}
	try {
		return allow(locals.person, action);
	} catch (refusal) {
		throwPageError(refusal);
	}
}

function throwPageError(cause: unknown): never {
	if (cause instanceof AppError) error(cause.status, { message: cause.message, code: cause.code });
	throw cause;
}

/** Runs what a page loads, and shows a coded error as the page's error. */
export async function orPageError<T>(work: Promise<T>): Promise<T> {
	return work.catch(throwPageError);
}
