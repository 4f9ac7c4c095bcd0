import { fail, redirect } from '@sveltejs/kit';
import { versionSchema } from '$lib/schemas/fields';
import { describeAnswer, questionsFor } from '$lib/schemas/survey-step';
import { AppError, type FieldProblem } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { saveSurvey } from '$lib/server/services/mounts';
import { explainSurvey, getPreview } from '$lib/server/services/previews';
import { openMount } from '../../open-mount';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const { job, preview } = await orPageError(getPreview(person, mount.jobId));
	const sections = questionsFor(mount.positionKind).map((question) => ({
		id: question.id,
		title: question.title,
		answers: describeAnswer(question, mount.survey)
	}));
	const explained = explainSurvey(preview, mount.survey);
	return { mount, jobNumber: job.number, preview, sections, explained };
};

/** The summary leads to the row of the answer that is missing. */
function refuse(refusal: unknown) {
	if (!(refusal instanceof AppError)) throw refusal;
	const problems: FieldProblem[] =
		refusal.problems.length > 0 ? refusal.problems : [{ path: '', message: refusal.message }];
	return fail(refusal.status, { problems: problems.map(({ path, message }) => ({ path, message })) });
}

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'mounts.write');
		const { id, jobId, survey } = await openMount(person, event.params);
		const seen = (await readPageForm(event.request)).get('version');
		try {
			const version = validate(versionSchema, seen);
			await saveSurvey(person, id, { survey, complete: true, version });
		} catch (refusal) {
			return refuse(refusal);
		}
		redirect(303, `/jobs/${jobId}#mounts`);
	}
};
