import { redirect } from '@sveltejs/kit';
import { firstOpenStep } from '$lib/schemas/survey-step';
import { guard } from '$lib/server/http/guard';
import { openMount } from '../open-mount';
import type { PageServerLoad } from './$types';

/** Goes on where the survey was left. */
export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	redirect(303, `/mounts/${mount.id}/survey/${firstOpenStep(mount.survey)}`);
};
