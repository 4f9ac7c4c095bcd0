import { redirect } from '@sveltejs/kit';
import { fail } from '@sveltejs/kit';
import { message } from 'sveltekit-superforms';
import { signInLinkSchema, signInSchema } from '$lib/schemas/people';
import { mailSignInLink } from '$lib/server/auth/mailed-link';
import { safeReturnPath, signInWith } from '$lib/server/auth/sign-in';
import { env } from '$lib/server/env';
import { loadForm, readForm, readPageForm, refuseForm } from '$lib/server/http/forms';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const to = safeReturnPath(url.searchParams.get('to'));
	if (locals.person) redirect(303, to);
	const [password, link] = await Promise.all([loadForm(signInSchema), loadForm(signInLinkSchema)]);
	password.id = 'password';
	link.id = 'link';
	return {
		...{ password, link, sessionEnd: locals.sessionEnd },
		...{ mailed: url.searchParams.has('mailed'), isDemo: env().SOAKLINE_DEMO === '1' }
	};
};

export const actions: Actions = {
	password: async (event) => {
		const { form, data } = await readForm(await readPageForm(event.request.clone()), signInSchema);
		form.id = 'password';
		form.data.password = '';
		if (data === null) return fail(422, { form });
		const to = safeReturnPath(event.url.searchParams.get('to'));
		const refusal = await signInWith(event, { provider: 'password', ...data }, to);
		return message(form, refusal, { status: 401 });
	},
	link: async (event) => {
		const { form, data } = await readForm(await readPageForm(event.request.clone()), signInLinkSchema);
		form.id = 'link';
		if (data === null) return fail(422, { form });
		try {
			await mailSignInLink(data.mailTo, event.getClientAddress());
		} catch (error) {
			return refuseForm(form, error);
		}
		redirect(303, '/sign-in?mailed');
	}
};
