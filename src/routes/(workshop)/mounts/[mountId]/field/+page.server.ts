import { guard, orPageError } from '$lib/server/http/guard';
import { presentTrend, presentNote } from '$lib/server/presenters/field-reports';
import { listFieldNotes } from '$lib/server/services/field-notes';
import { getJob } from '$lib/server/services/jobs';
import { openMount } from '../open-mount';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const mount = await openMount(person, event.params);
	const { rows, trend } = await orPageError(listFieldNotes(person, mount.id));
	const job = await orPageError(getJob(person, mount.jobId));
	return {
		mount,
		job: { id: job.id, number: job.number },
		notes: rows.map(presentNote),
		trend: trend && presentTrend(trend),
		isAdded: event.url.searchParams.has('added')
	};
};
