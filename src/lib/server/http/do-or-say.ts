import { fail, type RequestEvent } from '@sveltejs/kit';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import type { Action } from '../policies';
import { readPageForm } from './forms';
import { guard } from './guard';

/** A form of a single button: does it, or comes back to the page with the one sentence that says why not. */
export async function doOrSay<T>(
	event: RequestEvent,
	action: Action,
	work: (person: SignedInPerson, sent: FormData) => Promise<T>
) {
	const person = guard(event, action);
	const sent = await readPageForm(event.request);
	try {
		return await work(person, sent);
	} catch (refusal) {
		if (!(refusal instanceof AppError)) throw refusal;
		return fail(refusal.status, { refusal: refusal.message });
	}
}
