import { idSchema } from '$lib/schemas/fields';
import { mountInputSchema } from '$lib/schemas/mounts';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { getJob } from '$lib/server/services/jobs';
import { addMount } from '$lib/server/services/mounts';
import type { Actions, PageServerLoad } from './$types';

const idOf = (params: { jobId: string }): number => idSchema.safeParse(params.jobId).data ?? 0;

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const { id, number } = await orPageError(getJob(person, idOf(event.params)));
	return { jobId: id, jobNumber: number, form: await loadForm(mountInputSchema) };
};

export const actions: Actions = {
	default: (event) =>
		saveForm(event, {
			action: 'mounts.write',
			schema: mountInputSchema,
			save: async (person, data) => {
				const mount = await addMount(person, idOf(event.params), data);
				return `/mounts/${mount.id}/survey`;
			}
		})
};
