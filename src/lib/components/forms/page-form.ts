import { superForm, type FormOptions, type SuperValidated } from 'sveltekit-superforms';
import type { FormValues } from '$lib/format/form-values';

/**
 * The form of a page, made once from what the server sent; answers come back through the library. What was typed
 * stays after it was sent, and the summary of what is wrong takes the focus, not the first wrong box.
 */
export function openPageForm(
	sent: () => SuperValidated<FormValues, string>,
	options: FormOptions<FormValues, string> = {}
) {
	return superForm(sent(), { resetForm: false, autoFocusOnError: false, ...options });
}
