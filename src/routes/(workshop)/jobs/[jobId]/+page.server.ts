import { fail, redirect } from '@sveltejs/kit';
import { AppError } from '$lib/server/errors';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { assessJob } from '$lib/server/services/assessments';
import { getJob } from '$lib/server/services/jobs';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	return { job: await orPageError(getJob(person, pageId(event.params.jobId))) };
};

export const actions: Actions = {
	/** Works out every surveyed mount; one leads to its assessment, several to their comparison. */
	assess: async (event) => {
		const person = guard(event, 'assessments.run');
		const jobId = pageId(event.params.jobId);
		const made = await assessJob(person, jobId).catch((error: unknown) => {
			if (error instanceof AppError) return error;
			throw error;
		});
		if (made instanceof AppError) return fail(made.status, { refusal: made.message });
		const [only] = made;
		redirect(303, only && made.length === 1 ? `/assessments/${only.id}` : `/jobs/${jobId}/compare`);
	}
};
