import { redirect } from '@sveltejs/kit';
import { cableFormSchema, fromCableForm, toCableForm } from '$lib/schemas/cable-form';
import { versionSchema } from '$lib/schemas/fields';
import { saveEdited } from '$lib/server/http/edit-form';
import { loadForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { getJob } from '$lib/server/services/jobs';
import { getMount, saveCable } from '$lib/server/services/mounts';
import { openMount } from '../open-mount';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const job = await orPageError(getJob(person, mount.jobId));
	const { version, cable } = mount;
	const assessmentId = job.standings.find(({ mountId }) => mountId === mount.id)?.assessmentId ?? null;
	return {
		...{ mount, assessmentId },
		job: { id: job.id, number: job.number },
		form: await loadForm(cableFormSchema, { version, ...toCableForm(cable) }),
		isSaved: event.url.searchParams.has('saved'),
		isTakenBack: event.url.searchParams.has('taken-back')
	};
};

export const actions: Actions = {
	save: (event) => {
		const mountId = pageId(event.params.mountId);
		return saveEdited(event, {
			action: 'mounts.write',
			schema: cableFormSchema,
			save: async (person, form) => {
				const { version } = form;
				await saveCable(person, mountId, { cable: fromCableForm(form), version });
				return `/mounts/${mountId}/cable?saved`;
			},
			newest: async (person) => {
				const { version, cable } = await getMount(person, mountId);
				return { version, ...toCableForm(cable) };
			}
		});
	},
	takeBack: async (event) => {
		const person = guard(event, 'mounts.write');
		const { id } = await openMount(person, event.params);
		const sent = await event.request.formData();
		const change = async () => {
			const version = validate(versionSchema, sent.get('version') ?? undefined);
			await saveCable(person, id, { cable: null, version });
		};
		await orPageError(change());
		redirect(303, `/mounts/${id}/cable?taken-back`);
	}
};
