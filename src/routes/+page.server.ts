import { redirect } from '@sveltejs/kit';
import type { PageServerLoad } from './$types';

/** Everybody starts where their work is. */
export const load: PageServerLoad = ({ locals }) => {
	if (locals.person === null) redirect(303, '/sign-in');
	redirect(303, locals.person.role === 'customer' ? '/my' : '/jobs');
};
