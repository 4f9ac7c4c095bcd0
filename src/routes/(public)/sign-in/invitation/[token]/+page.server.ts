import { fail } from '@sveltejs/kit';
import { message } from 'sveltekit-superforms';
import { newPasswordSchema } from '$lib/schemas/people';
import { signInWith } from '$lib/server/auth/sign-in';
import { readByLink, writeByLink } from '$lib/server/http/by-link';
import { loadForm, readForm, readPageForm, refuseForm } from '$lib/server/http/forms';
import { orPageError } from '$lib/server/http/guard';
import { acceptInvitation, openInvitation } from '$lib/server/services/invitations';
import type { Actions, PageServerLoad } from './$types';

/** Opening the link accepts nothing: programs that scan mail open links too. The button does. */
export const load: PageServerLoad = async (event) => ({
	invitation: await orPageError(readByLink(event, () => openInvitation(event.params.token))),
	form: await loadForm(newPasswordSchema)
});

export const actions: Actions = {
	default: async (event) => {
		const sent = await readPageForm(event.request.clone());
		const { form, data } = await readForm(sent, newPasswordSchema);
		if (data === null) return fail(422, { form });
		const { password } = data;
		let email: string;
		try {
			email = await writeByLink(event, () => acceptInvitation(event.params.token, password));
		} catch (error) {
			return refuseForm(form, error);
		}
		const refusal = await signInWith(event, { provider: 'password', email, password }, '/');
		return message(form, refusal, { status: 401 });
	}
};
