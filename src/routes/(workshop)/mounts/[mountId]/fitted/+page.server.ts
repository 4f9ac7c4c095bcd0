import { redirect } from '@sveltejs/kit';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import {
	agreementChangeSchema,
	fittingFormSchema,
	fromFittingForm,
	toFittingForm
} from '$lib/schemas/fitting';
import type { SignedInPerson } from '$lib/schemas/people';
import type { RecommendationView } from '$lib/schemas/recommendations';
import { doOrSay } from '$lib/server/http/do-or-say';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { holdFitting } from '$lib/server/services/fitting-agreement';
import { finishFollowUp, getFitting, saveFitting } from '$lib/server/services/fittings';
import { listRecommendations } from '$lib/server/services/recommendations';
import { findReminded } from '$lib/server/services/reminders';
import { getJob } from '$lib/server/services/jobs';
import { openMount } from '../open-mount';
import type { Actions, PageServerLoad } from './$types';

/** The recommendation that it was held against until a moment ago. */
async function findHeldBefore(
	person: SignedInPerson,
	jobId: number,
	url: URL
): Promise<RecommendationView | null> {
	const read = idSchema.safeParse(url.searchParams.get('heldBefore') ?? undefined);
	if (!read.success) return null;
	const made = await orPageError(listRecommendations(person, jobId));
	return made.find(({ id }) => id === read.data) ?? null;
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const fitting = await orPageError(getFitting(person, mount.id));
	const job = await orPageError(getJob(person, mount.jobId));
	const followUpAt = (name: string) =>
		fitting.followUps.find(({ id }) => String(id) === event.url.searchParams.get(name)) ?? null;
	const early = followUpAt('early');
	const known = fitting.installation ? toFittingForm(fitting.installation) : { fittedBy: person.name };
	return {
		...{ mount, fitting },
		reminded: await orPageError(findReminded(person, mount.jobId)),
		early: early?.isEarly ? early : null,
		looked: followUpAt('looked'),
		job: { id: job.id, number: job.number },
		form: await loadForm(fittingFormSchema, known),
		isSaved: event.url.searchParams.has('saved'),
		heldBefore: await findHeldBefore(person, mount.jobId, event.url)
	};
};

export const actions: Actions = {
	save: (event) => {
		const mountId = pageId(event.params.mountId);
		return saveEdited(event, {
			action: 'mounts.write',
			schema: fittingFormSchema,
			save: async (person, form) => {
				await saveFitting(person, mountId, fromFittingForm(form));
				return `/mounts/${mountId}/fitted?saved`;
			},
			newest: async (person) => toFittingForm((await getFitting(person, mountId)).installation)
		});
	},
	hold: (event) =>
		doOrSay(event, 'mounts.write', async (person, sent): Promise<never> => {
			const mountId = pageId(event.params.mountId);
			const change = validate(agreementChangeSchema, Object.fromEntries(sent));
			const before = (await getFitting(person, mountId)).recommendation.id;
			await holdFitting(person, mountId, change);
			redirect(303, `/mounts/${mountId}/fitted?heldBefore=${before}`);
		}),
	done: async (event) => {
		const person = guard(event, 'mounts.write');
		const { id } = await openMount(person, event.params);
		const sent = await event.request.formData();
		const change = async () => {
			const followUpId = validate(idSchema, sent.get('followUp') ?? undefined);
			const version = validate(versionSchema, sent.get('version') ?? undefined);
			const isDone = sent.get('isDone') === 'true';
			const { followUps } = await getFitting(person, id);
			const isEarly = followUps.some((each) => each.id === followUpId && each.isEarly);
			if (isDone && isEarly && sent.get('isSure') !== 'true') return `?early=${followUpId}#early`;
			await finishFollowUp(person, followUpId, { isDone, version });
			return `?looked=${followUpId}#dates`;
		};
		redirect(303, `/mounts/${id}/fitted${await orPageError(change())}`);
	}
};
