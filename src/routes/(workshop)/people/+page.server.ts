import type { RequestEvent } from '@sveltejs/kit';
import { invitationInputSchema, type SignedInPerson } from '$lib/schemas/people';
import { idSchema } from '$lib/schemas/fields';
import { besideForm } from '$lib/server/http/beside-form';
import { loadForm, readPageForm, saveForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { invite, inviteAgain, withdrawInvitation } from '$lib/server/services/invitations';
import { listPeople } from '$lib/server/services/people';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'people.read');
	return {
		...(await orPageError(listPeople(person))),
		form: await loadForm(invitationInputSchema, { role: 'installer' }),
		done: event.url.searchParams.get('done')
	};
};

/** One button on one invitation; what is typed for the next one stays. */
async function doWithInvitation(
	event: RequestEvent,
	done: string,
	work: (person: SignedInPerson, invitationId: number) => Promise<unknown>
) {
	const person = guard(event, 'people.write');
	const sent = await readPageForm(event.request);
	return besideForm({ sent, schema: invitationInputSchema }, async () => {
		await work(person, validate(idSchema, sent.get('invitation') ?? undefined));
		return { done };
	});
}

export const actions: Actions = {
	invite: (event) =>
		saveForm(event, {
			action: 'people.write',
			schema: invitationInputSchema,
			save: async (person, input) => {
				await invite(person, input);
				return '/people?done=invited#invitations';
			}
		}),
	again: (event) => doWithInvitation(event, 'again', inviteAgain),
	withdraw: (event) => doWithInvitation(event, 'withdrawn', withdrawInvitation)
};
