import type { z } from 'zod';
import type { FormValues } from '$lib/format/form-values';
import { fillForm, refuseForm } from './forms';

/**
 * What a button does that stands beside a form and sends it along: its own thing, and what was typed in the form comes
 * back as it was. Nothing of that is checked or stored.
 */
export async function besideForm<S extends z.ZodObject>(
	{ sent, schema }: { sent: FormData; schema: S },
	work: () => Promise<{ done: string; filled?: FormValues }>
) {
	const typed = await fillForm(sent, schema, {});
	try {
		const { done, filled } = await work();
		return { form: { ...typed, data: { ...typed.data, ...filled }, valid: false }, done };
	} catch (refusal) {
		return refuseForm(typed, refusal);
	}
}
