import type { JobView } from '$lib/schemas/jobs';
import type { SignedInPerson } from '$lib/schemas/people';
import { presentPreview, type PreviewView } from '../presenters/preview';
import { bookInForce, coefficientsOf } from './books';
import { getJob } from './jobs';

/** A job, and what its pages need to show the day's curve while something is being changed. */
export async function getPreview(
	person: SignedInPerson,
	jobId: number
): Promise<{ job: JobView; preview: PreviewView }> {
	const [job, book] = await Promise.all([getJob(person, jobId), bookInForce(person)]);
	return { job, preview: presentPreview(job, coefficientsOf(book)) };
}
