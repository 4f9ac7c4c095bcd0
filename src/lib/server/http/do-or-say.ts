import { fail, type RequestEvent } from '@sveltejs/kit';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '../errors';
import type { Action } from '../policies';
import { readPageForm } from './forms';
import { guard } from './guard';

/** A schema's own sentence names its field already; only one that does not comes with the name in front. */
function sayRefusal({ message, problems: [first] }: AppError): string {
	return first && /^[A-Z]/.test(first.message) ? first.message : message;
}

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
		return fail(refusal.status, { refusal: sayRefusal(refusal) });
	}
}
