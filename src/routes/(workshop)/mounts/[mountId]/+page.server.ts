import { redirect } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';
import { guard, orPageError } from '$lib/server/http/guard';
import { removeMount, restoreMount } from '$lib/server/services/mounts';
import { openMount } from './open-mount';
import type { Actions, PageServerLoad } from './$types';

/** A mount is looked at in its survey. */
export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	redirect(303, `/mounts/${mount.id}/survey/check`);
};

const idOf = (params: { mountId: string }): number => idSchema.safeParse(params.mountId).data ?? 0;

export const actions: Actions = {
	remove: async (event) => {
		const person = guard(event, 'mounts.write');
		const { id, jobId, letter } = await orPageError(removeMount(person, idOf(event.params)));
		redirect(303, `/jobs/${jobId}?removed=${id}&letter=${letter}#mounts`);
	},
	restore: async (event) => {
		const person = guard(event, 'mounts.write');
		const { jobId } = await orPageError(restoreMount(person, idOf(event.params)));
		redirect(303, `/jobs/${jobId}#mounts`);
	}
};
