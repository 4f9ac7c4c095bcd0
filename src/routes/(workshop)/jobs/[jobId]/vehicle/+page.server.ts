import { vehicleInputSchema } from '$lib/schemas/vehicles';
import { versionSchema } from '$lib/schemas/fields';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { updateVehicle } from '$lib/server/services/vehicles';
import { getJob } from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

const changeSchema = vehicleInputSchema.extend({ version: versionSchema });

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'vehicles.write');
	const job = await orPageError(getJob(person, pageId(event.params.jobId)));
	return { jobId: job.id, jobNumber: job.number, form: await loadForm(changeSchema, job.vehicle) };
};

export const actions: Actions = {
	default: (event) => {
		const jobId = pageId(event.params.jobId);
		return saveEdited(event, {
			action: 'vehicles.write',
			schema: changeSchema,
			save: async (person, data) => {
				const { vehicle } = await getJob(person, jobId);
				await updateVehicle(person, vehicle.id, data);
				return `/jobs/${jobId}`;
			},
			newest: async (person) => (await getJob(person, jobId)).vehicle
		});
	}
};
