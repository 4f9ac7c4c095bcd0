import { error, fail, redirect } from '@sveltejs/kit';
import { describeAnswer, findStep, mergeStep, stepSchema, type SurveyStep } from '$lib/schemas/survey-step';
import { versionSchema } from '$lib/schemas/fields';
import type { MountView } from '$lib/schemas/mounts';
import { AppError } from '$lib/server/errors';
import { loadForm, readForm, readPageForm, refuseForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { saveSurvey } from '$lib/server/services/mounts';
import { getPreview } from '$lib/server/services/previews';
import { openMount } from '../../open-mount';
import type { Actions, PageServerLoad } from './$types';

function stepOf({ positionKind }: MountView, id: string): SurveyStep {
	const step = findStep(positionKind, id);
	if (!step) error(404, { message: 'The survey of this mount has no such question.', code: 'not_found' });
	return step;
}

const formId = ({ id }: MountView, { question }: SurveyStep): string => `survey-${id}-${question.id}`;

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const step = stepOf(mount, event.params.step);
	const [{ job, preview }, form] = await Promise.all([
		orPageError(getPreview(person, mount.jobId)),
		loadForm(stepSchema(step.question, mount.positionKind, { ...mount.survey }), { ...mount.survey })
	]);
	form.id = formId(mount, step);
	const isFromCheck = event.url.searchParams.get('from') === 'check';
	return { personId: person.id, mount, step, form, preview, jobNumber: job.number, isFromCheck };
};

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'mounts.write');
		const mount = await openMount(person, event.params);
		const step = stepOf(mount, event.params.step);
		const formData = await readPageForm(event.request);
		const values = Object.fromEntries(formData);
		const schema = stepSchema(step.question, mount.positionKind, values);
		const { form, data } = await readForm(formData, schema);
		form.id = formId(mount, step);
		if (data === null) return fail(422, { form });
		try {
			const version = validate(versionSchema, values.version);
			const survey = mergeStep(mount.survey, step.question, data);
			await saveSurvey(person, mount.id, { survey, complete: mount.surveyComplete, version });
		} catch (refusal) {
			if (!(refusal instanceof AppError) || refusal.code !== 'changed_meanwhile')
				return refuseForm(form, refusal);
			form.valid = false;
			form.message =
				'Somebody changed this survey while you had it open. Your answers are still here: look at what is stored now, then save yours again if they should take its place.';
			const stored = describeAnswer(step.question, mount.survey);
			return fail(409, { form, stored, version: mount.version });
		}
		const next = event.url.searchParams.get('from') === 'check' ? 'check' : step.next;
		redirect(303, `/mounts/${mount.id}/survey/${next}`);
	}
};
