import { idSchema } from '$lib/schemas/fields';
import { jobBatterySchema } from '$lib/schemas/jobs';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { listBatteries } from '$lib/server/services/batteries';
import { getJob, setJobBattery } from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.write');
	const [job, batteries] = await orPageError(
		Promise.all([getJob(person, pageId(event.params.jobId)), listBatteries(person)])
	);
	// A battery that was just added for this job is chosen already.
	const added = idSchema.safeParse(event.url.searchParams.get('chosen') ?? undefined).data;
	const batteryRecordId = added ?? job.battery?.id;
	const form = await loadForm(jobBatterySchema, { version: job.version, batteryRecordId });
	return { job, batteries, form };
};

export const actions: Actions = {
	default: (event) => {
		const jobId = pageId(event.params.jobId);
		return saveEdited(event, {
			action: 'jobs.write',
			schema: jobBatterySchema,
			save: async (person, data) => `/jobs/${(await setJobBattery(person, jobId, data)).id}`,
			newest: async (person) => {
				const { version, battery } = await getJob(person, jobId);
				return { version, batteryRecordId: battery?.id };
			}
		});
	}
};
