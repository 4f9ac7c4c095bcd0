import { error } from '@sveltejs/kit';
import { fieldNoteStrikeSchema } from '$lib/schemas/field-notes';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { presentNote } from '$lib/server/presenters/field-reports';
import { listFieldNotes } from '$lib/server/services/field-notes';
import { strikeFieldNote } from '$lib/server/services/field-strikes';
import { getJob } from '$lib/server/services/jobs';
import { openMount } from '../../../open-mount';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const { rows } = await orPageError(listFieldNotes(person, mount.id));
	const noteId = pageId(event.params.noteId);
	const note = rows.find(({ id }) => id === noteId);
	if (!note) error(404, { message: 'There is no such note here.' });
	const job = await orPageError(getJob(person, mount.jobId));
	return {
		...{ mount, note: presentNote(note) },
		job: { id: job.id, number: job.number },
		form: await loadForm(fieldNoteStrikeSchema)
	};
};

export const actions: Actions = {
	default: (event) => {
		guard(event, 'mounts.write');
		const mountId = pageId(event.params.mountId);
		const noteId = pageId(event.params.noteId);
		return saveForm(event, {
			action: 'mounts.write',
			schema: fieldNoteStrikeSchema,
			save: async (person, change) => {
				await strikeFieldNote(person, mountId, noteId, change);
				return `/mounts/${mountId}/field?struck`;
			}
		});
	}
};
