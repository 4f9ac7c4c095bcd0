import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { answerFormSchema, type Question } from '$lib/schemas/questions';
import { AppError } from '$lib/server/errors';
import { doOrSay } from '$lib/server/http/do-or-say';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { mayDo } from '$lib/server/policies';
import { assessJob } from '$lib/server/services/assessments';
import { listMountPictures } from '$lib/server/services/files';
import { listFitted } from '$lib/server/services/fittings';
import { getJob } from '$lib/server/services/jobs';
import { newestRecommendation } from '$lib/server/services/recommendations';
import { listSentLetters, noteLetterArrived, sendLetterAgain } from '$lib/server/services/sent-letters';
import { answerQuestion, listQuestions } from '$lib/server/services/questions';
import { findWaitingErasure } from '$lib/server/services/waiting-erasures';
import type { Actions, PageServerLoad } from './$types';

/** The question that was chosen; else the first that nobody has answered. */
function chooseQuestion(questions: readonly Question[], asked: string | null): Question | null {
	const answerable = questions.filter(({ takesAnswers }) => takesAnswers);
	const chosen = answerable.find(({ id }) => String(id) === asked);
	return chosen ?? answerable.find(({ answers }) => answers.length === 0) ?? null;
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const jobId = pageId(event.params.jobId);
	const [job, questions, letters, pictures, recommendation, fitted] = await orPageError(
		Promise.all([
			getJob(person, jobId),
			listQuestions(person, jobId),
			listSentLetters(person, jobId),
			listMountPictures(person, jobId),
			newestRecommendation(person, jobId),
			listFitted(person, jobId)
		])
	);
	const erasure = await orPageError(findWaitingErasure(person, job.customer.id));
	const toAnswer = chooseQuestion(questions, event.url.searchParams.get('question'));
	const recommendedMountId = recommendation?.assessment.mountId ?? null;
	const answerForm = await loadForm(answerFormSchema);
	const hasTraces = mayDo(person, 'traces.read');
	return {
		...{ job, questions, letters, pictures, erasure },
		...{ toAnswer, answerForm, recommendedMountId, fitted, hasTraces }
	};
};

/** One button on one letter; a refusal stands with the letters. */
async function decideLetter(event: RequestEvent, decide: typeof sendLetterAgain) {
	const refused = await doOrSay(event, 'sheets.write', async (person, sent): Promise<never> => {
		await decide(person, pageId(String(sent.get('letterId') ?? '')));
		redirect(303, `/jobs/${pageId(event.params.jobId)}#letters`);
	});
	return fail(refused.status, { letterRefusal: refused.data.refusal });
}

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
	},
	/** Another row of tries for a letter at rest. */
	again: (event) => decideLetter(event, sendLetterAgain),
	/** Its reader says that it is there. */
	arrived: (event) => decideLetter(event, noteLetterArrived),
	answer: (event) =>
		saveForm(event, {
			action: 'questions.answer',
			schema: answerFormSchema,
			save: async (person, { questionId, answer }) => {
				await answerQuestion(person, questionId, answer);
				return `/jobs/${pageId(event.params.jobId)}#question-${questionId}`;
			}
		})
};
