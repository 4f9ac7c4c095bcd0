import { fail, redirect } from '@sveltejs/kit';
import { signInWith } from '$lib/server/auth/sign-in';
import type { Actions, PageServerLoad } from './$types';

/** Opening the link signs nobody in: mail scanners open links too. The button does. */
export const load: PageServerLoad = ({ locals }) => {
	if (locals.person) redirect(303, '/');
};

export const actions: Actions = {
	default: async (event) => {
		const refusal = await signInWith(event, { provider: 'link', token: event.params.token }, '/');
		return fail(401, { refusal });
	}
};
