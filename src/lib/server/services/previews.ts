import type { JobView } from '$lib/schemas/jobs';
import type { SignedInPerson } from '$lib/schemas/people';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { buildScenario, type BuiltScenario } from '$lib/thermal/survey';
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

/** How the answers become numbers, and what nobody measured; null while the job lacks what that takes. */
export function explainSurvey(
	{ base, dayPlan }: PreviewView,
	survey: SurveyAnswers
): Pick<BuiltScenario, 'derivations' | 'assumptions'> | null {
	if (!base || !dayPlan) return null;
	const { derivations, assumptions } = buildScenario({ ...base, dayPlan, survey });
	return { derivations, assumptions };
}
