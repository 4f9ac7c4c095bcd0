import type { RequestEvent } from '@sveltejs/kit';
import type { z } from 'zod';
import type { Action } from '../policies';
import { fillForm, readPageForm } from './forms';
import { guard } from './guard';

/** The name of the button. */
const REDRAW = 'redraw';

/**
 * For a page whose boxes follow one of its answers: without a script a button named `redraw` brings it back with every
 * word still in its box, and nothing is checked or stored. Anything else that is sent is saved.
 */
export async function redrawOr<S extends z.ZodObject, T>(
	event: RequestEvent,
	{ action, schema }: { action: Action; schema: S },
	save: () => Promise<T>
) {
	guard(event, action);
	const formData = await readPageForm(event.request.clone() as Request);
	return formData.has(REDRAW) ? { form: await fillForm(formData, schema, {}) } : save();
}
