import type { JobView } from '$lib/schemas/jobs';
import type { SignedInPerson } from '$lib/schemas/people';
import { closestBook } from '$lib/schemas/books';
import { previewInputs, type PreviewBase } from '$lib/schemas/preview';
import type { SurveyAnswers } from '$lib/schemas/survey';
import { buildScenario, POSITION_KINDS, type BuiltScenario } from '$lib/thermal/survey';
import { presentPreview, type PreviewView } from '../presenters/preview';
import { coefficientsOf, listInForce, noBookInForce, withCoefficients } from './books';
import { getJob } from './jobs';

/** A job, and what its pages need to show the day's curve while something is being changed. */
export async function getPreview(
	person: SignedInPerson,
	jobId: number
): Promise<{ job: JobView; preview: PreviewView }> {
	const [job, books] = await Promise.all([getJob(person, jobId), listInForce(person.workshopId)]);
	const read = await Promise.all(books.map(withCoefficients));
	// The same object where the same book holds, so that it travels once.
	const inForce = read.map((book) => ({ ...book, values: coefficientsOf(book) }));
	const { engineLayout } = job.vehicle;
	const at = POSITION_KINDS.map((positionKind) => {
		const book = closestBook(inForce, { engineLayout, positionKind });
		if (!book) throw noBookInForce();
		return [positionKind, book.values];
	});
	const coefficientsAt = Object.fromEntries(at) as PreviewBase['coefficientsAt'];
	return { job, preview: presentPreview(job, coefficientsAt) };
}

/** How the answers become numbers, and what nobody measured; null while the job lacks what that takes. */
export function explainSurvey(
	{ base, dayPlan }: PreviewView,
	survey: SurveyAnswers
): Pick<BuiltScenario, 'derivations' | 'assumptions'> | null {
	if (!base || !dayPlan) return null;
	const { derivations, assumptions } = buildScenario(previewInputs(base, dayPlan, survey));
	return { derivations, assumptions };
}
