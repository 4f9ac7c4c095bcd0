import { customerInputSchema } from '$lib/schemas/customers';
import { versionSchema } from '$lib/schemas/fields';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { updateCustomer } from '$lib/server/services/customers';
import { getJob } from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

const changeSchema = customerInputSchema.extend({ version: versionSchema });

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'customers.write');
	const job = await orPageError(getJob(person, pageId(event.params.jobId)));
	return { jobId: job.id, jobNumber: job.number, form: await loadForm(changeSchema, job.customer) };
};

export const actions: Actions = {
	default: (event) => {
		const jobId = pageId(event.params.jobId);
		return saveEdited(event, {
			action: 'customers.write',
			schema: changeSchema,
			save: async (person, data) => {
				const { customer } = await getJob(person, jobId);
				await updateCustomer(person, customer.id, data);
				return `/jobs/${jobId}`;
			},
			newest: async (person) => (await getJob(person, jobId)).customer
		});
	}
};
