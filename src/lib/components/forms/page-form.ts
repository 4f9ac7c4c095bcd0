import { superForm, type FormOptions, type SuperValidated } from 'sveltekit-superforms';
import type { FormValues } from '$lib/format/form-values';
import { isSignedOut, SIGNED_OUT } from './signed-out';

/**
 * The form of a page, made once from what the server sent; answers come back through the library. What was typed
 * stays after it was sent, also when nobody is signed in any more, and the summary of what is wrong takes the focus,
 * not the first wrong box.
 */
export function openPageForm(
	sent: () => SuperValidated<FormValues, string>,
	options: FormOptions<FormValues, string> = {}
) {
	const opened = superForm(sent(), {
		resetForm: false,
		autoFocusOnError: false,
		...options,
		onResult: async (event) => {
			if (!isSignedOut(event.result, window.location.href)) {
				await options.onResult?.(event);
				return;
			}
			event.cancel();
			opened.message.set(SIGNED_OUT);
		}
	});
	return opened;
}
