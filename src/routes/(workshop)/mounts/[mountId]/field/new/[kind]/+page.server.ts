import { error } from '@sveltejs/kit';
import { FIELD_NOTE_FORMS, fromFieldNoteForm } from '$lib/schemas/field-note-forms';
import { FIELD_NOTE_KINDS, type FieldNoteKind } from '$lib/schemas/field-notes';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { keepFieldNote, weighFieldNote } from '$lib/server/services/field-notes';
import { getFitting } from '$lib/server/services/fittings';
import { getJob } from '$lib/server/services/jobs';
import { openMount } from '../../../open-mount';
import type { Actions, PageServerLoad } from './$types';

function readKind(asked: string): FieldNoteKind {
	const kind = FIELD_NOTE_KINDS.find((each) => each === asked);
	if (!kind) error(404, { message: 'There is no such kind of note.' });
	return kind;
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'mounts.write');
	const mount = await openMount(person, event.params);
	const kind = readKind(event.params.kind);
	const fitting = await orPageError(getFitting(person, mount.id));
	if (!fitting.installation)
		error(409, { message: 'This mount has not been fitted yet: say first when it was.' });
	const job = await orPageError(getJob(person, mount.jobId));
	const hottestDayC = job.hotDay?.hotDayMaxC;
	const known = {
		...(kind === 'peak-label' || kind === 'cut-out' ? { hottestDayC } : {}),
		...(kind === 'cut-out' ? { within: '0.5' } : {})
	};
	return {
		...{ mount, kind },
		job: { id: job.id, number: job.number },
		form: await loadForm(FIELD_NOTE_FORMS[kind], known as never)
	};
};

export const actions: Actions = {
	default: (event) => {
		guard(event, 'mounts.write');
		const mountId = pageId(event.params.mountId);
		const kind = readKind(event.params.kind);
		return saveForm(event, {
			action: 'mounts.write',
			schema: FIELD_NOTE_FORMS[kind],
			prepare: (person, form) => weighFieldNote(person, mountId, fromFieldNoteForm(kind, form)),
			save: async (person, _, weighed) => {
				await keepFieldNote(person, mountId, weighed);
				return `/mounts/${mountId}/field?added`;
			}
		});
	}
};
