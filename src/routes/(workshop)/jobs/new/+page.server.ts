import { newJobSchema, repeatJobSchema } from '$lib/schemas/jobs';
import { vehicleQuerySchema } from '$lib/schemas/vehicles';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { createJob, repeatJob } from '$lib/server/services/jobs';
import { findVehicles } from '$lib/server/services/vehicles';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.write');
	const asked = vehicleQuerySchema.safeParse({ search: event.url.searchParams.get('vehicle') ?? '' });
	const search = asked.data?.search ?? '';
	const [form, found] = await Promise.all([
		loadForm(newJobSchema, { towMassKg: 0, towDragAreaM2: 0, engineLayout: 'unknown' }),
		search ? orPageError(findVehicles(person, search)) : []
	]);
	return { form, search, found };
};

export const actions: Actions = {
	create: (event) =>
		saveForm(event, {
			action: 'jobs.write',
			schema: newJobSchema,
			save: async (person, data) => `/jobs/${(await createJob(person, data)).id}`
		}),
	repeat: (event) =>
		saveForm(event, {
			action: 'jobs.write',
			schema: repeatJobSchema,
			save: async (person, data) => `/jobs/${(await repeatJob(person, data)).id}`
		})
};
