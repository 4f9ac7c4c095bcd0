import type { LayoutServerLoad } from './$types';

/** What the frame shows. Every page guards itself. */
export const load: LayoutServerLoad = ({ locals }) => ({
	person: locals.person && { name: locals.person.name, workshopName: locals.person.workshopName }
});
