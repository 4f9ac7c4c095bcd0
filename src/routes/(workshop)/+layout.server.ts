import { env } from '$lib/server/env';
import type { LayoutServerLoad } from './$types';

/** What the frame shows. Every page guards itself. */
export const load: LayoutServerLoad = ({ locals }) => ({
	person: locals.person && {
		name: locals.person.name,
		role: locals.person.role,
		workshopName: locals.person.workshopName
	},
	isDemo: env().SOAKLINE_DEMO === '1'
});
