import { redirect } from '@sveltejs/kit';
import { endSession } from '$lib/server/auth/sign-in';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = () => redirect(303, '/');

export const actions: Actions = {
	default: async (event) => endSession(event)
};
