import { fail, redirect } from '@sveltejs/kit';
import { message } from 'sveltekit-superforms';
import { secondFactorCodeSchema } from '$lib/schemas/second-factor';
import { readStepToken } from '$lib/server/auth/second-step';
import { safeReturnPath, signInWith } from '$lib/server/auth/sign-in';
import { loadForm, readForm, readPageForm } from '$lib/server/http/forms';
import type { Actions, PageServerLoad } from './$types';

/** Whoever comes here without a first step begins with that. */
export const load: PageServerLoad = async ({ cookies, locals, url }) => {
	if (locals.person) redirect(303, safeReturnPath(url.searchParams.get('to')));
	if (!readStepToken(cookies)) redirect(303, '/sign-in');
	return { form: await loadForm(secondFactorCodeSchema) };
};

export const actions: Actions = {
	default: async (event) => {
		const sent = await readPageForm(event.request.clone());
		const { form, data } = await readForm(sent, secondFactorCodeSchema);
		if (data === null) return fail(422, { form });
		const token = readStepToken(event.cookies) ?? '';
		const to = safeReturnPath(event.url.searchParams.get('to'));
		const refusal = await signInWith(event, { provider: 'second-step', token, code: data.code }, to);
		return message(form, refusal, { status: 401 });
	}
};
