import { redirect, type RequestEvent } from '@sveltejs/kit';
import { versionSchema } from '$lib/schemas/fields';
import { roleChangeSchema, type SignedInPerson } from '$lib/schemas/people';
import { doOrSay } from '$lib/server/http/do-or-say';
import { loadForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { validate } from '$lib/server/http/validate';
import { changeRole, comeBack, getPerson, leave } from '$lib/server/services/people';
import { resetFactor } from '$lib/server/services/second-factor';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const manager = guard(event, 'people.read');
	const personId = pageId(event.params.personId);
	const each = await orPageError(getPerson(manager, personId));
	return {
		each,
		form: await loadForm(roleChangeSchema, { role: each.role, version: each.version }),
		done: event.url.searchParams.get('done')
	};
};

type Change = (manager: SignedInPerson, personId: number, version: number) => Promise<unknown>;

const change = (event: RequestEvent, done: string, work: Change) =>
	doOrSay(event, 'people.write', async (manager, sent) => {
		const personId = pageId(event.params.personId);
		await getPerson(manager, personId);
		await work(manager, personId, validate(versionSchema, sent.get('version') ?? undefined));
		redirect(303, personId === manager.id ? '/sign-in' : `/people/${personId}?done=${done}`);
	});

export const actions: Actions = {
	role: async (event) => {
		const personId = pageId(event.params.personId);
		const before = await orPageError(getPerson(guard(event, 'people.write'), personId));
		return saveForm(event, {
			action: 'people.write',
			schema: roleChangeSchema,
			save: async (manager, asked) => {
				const { role } = await changeRole(manager, personId, asked);
				return `/people/${personId}?done=${role === before.role ? 'same' : 'role'}`;
			}
		});
	},
	resetFactor: (event) =>
		doOrSay(event, 'people.write', async (manager) => {
			const personId = pageId(event.params.personId);
			await getPerson(manager, personId);
			await resetFactor(manager, personId);
			redirect(303, `/people/${personId}?done=factor`);
		}),
	leave: (event) => change(event, 'left', leave),
	comeBack: (event) => change(event, 'back', comeBack)
};
