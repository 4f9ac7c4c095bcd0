import { batteryInputSchema, CHEMISTRIES } from '$lib/schemas/batteries';
import { idSchema } from '$lib/schemas/fields';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { redrawOr } from '$lib/server/http/redraw-form';
import { guard } from '$lib/server/http/guard';
import { createBattery } from '$lib/server/services/batteries';
import type { Actions, PageServerLoad } from './$types';

/** The job that is waiting for this battery, if the way here came from one. */
function waitingJob(url: URL): number | null {
	return idSchema.safeParse(url.searchParams.get('job') ?? undefined).data ?? null;
}

export const load: PageServerLoad = async (event) => {
	guard(event, 'batteries.write');
	const form = await loadForm(batteryInputSchema, {
		chemistry: CHEMISTRIES[0],
		autoReset: true,
		underBonnet: 'silent'
	});
	return { form, jobId: waitingJob(event.url) };
};

const FORM = { action: 'batteries.write', schema: batteryInputSchema } as const;

export const actions: Actions = {
	default: (event) =>
		redrawOr(event, FORM, () =>
			saveForm(event, {
				...FORM,
				save: async (person, data) => {
					const { id } = await createBattery(person, data);
					const jobId = waitingJob(event.url);
					return jobId === null ? `/batteries/${id}?saved` : `/jobs/${jobId}/battery?chosen=${id}`;
				}
			})
		)
};
