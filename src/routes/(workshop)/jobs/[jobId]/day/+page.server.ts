import { fail, redirect } from '@sveltejs/kit';
import { blankDraft, changePlan, draftOfEntries, draftOfPlan, parsePlan } from '$lib/format/plan-draft';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import { DAY_PLAN_TEMPLATES } from '$lib/schemas/day-plan-form';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { getDayPlan, saveDayPlan } from '$lib/server/services/day-plans';
import { getPreview } from '$lib/server/services/previews';
import type { Actions, PageServerLoad } from './$types';

const idOf = (params: { jobId: string }): number => idSchema.safeParse(params.jobId).data ?? 0;

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'day-plans.write');
	const { job, preview } = await orPageError(getPreview(person, idOf(event.params)));
	const { dayPlan } = job;
	return {
		personId: person.id,
		job: { id: job.id, number: job.number, customerName: job.customer.name },
		draft: dayPlan ? draftOfPlan(dayPlan) : blankDraft(),
		version: dayPlan?.version ?? null,
		preview,
		mounts: job.mounts.map(({ id, letter, name, survey }) => ({ id, letter, name, survey })),
		templates: DAY_PLAN_TEMPLATES.map(({ id, about, plan }) => ({ id, about, name: plan.name }))
	};
};

const CHANGED =
	'Somebody changed this day while you had it open. Yours is still here and not stored: save it again to put it in place of theirs, or load the page again to see theirs.';

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'day-plans.write');
		const entries = Object.fromEntries(await readPageForm(event.request));
		const draft = draftOfEntries(entries);
		// A button of the editor: without a script the page comes back changed, and nothing is stored yet.
		if (typeof entries.do === 'string') return { draft: changePlan(draft, entries.do), problems: [] };
		const parsed = parsePlan(draft);
		if ('problems' in parsed) return fail(422, { draft, problems: parsed.problems });
		const jobId = idOf(event.params);
		try {
			const version = entries.version === '' ? null : validate(versionSchema, entries.version);
			await saveDayPlan(person, jobId, { ...parsed.plan, version });
		} catch (refusal) {
			if (!(refusal instanceof AppError)) throw refusal;
			if (refusal.code !== 'changed_meanwhile')
				return fail(refusal.status, { draft, problems: [{ path: '', message: refusal.message }] });
			// With the newest version in hand, the next save is meant to take its place.
			const version = (await getDayPlan(person, jobId))?.version ?? null;
			return fail(409, { draft, problems: [{ path: '', message: CHANGED }], version });
		}
		redirect(303, `/jobs/${jobId}#day`);
	}
};
