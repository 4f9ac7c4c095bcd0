import { fail, redirect, type RequestEvent } from '@sveltejs/kit';
import { secondFactorCodeSchema } from '$lib/schemas/second-factor';
import type { SignedInPerson } from '$lib/schemas/people';
import { doOrSay } from '$lib/server/http/do-or-say';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import {
	beginSetUp,
	confirmSetUp,
	getSecondFactor,
	renewRecoveryCodes,
	turnOff
} from '$lib/server/services/second-factor';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'second-factor.own');
	return {
		factor: await orPageError(getSecondFactor(person)),
		isOff: event.url.searchParams.has('off')
	};
};

/** What a code brings: recovery codes, which the answer to this one form shows and no page again. */
async function withCode(
	event: RequestEvent,
	of: 'confirm' | 'renew' | 'off',
	work: (person: SignedInPerson, code: string) => Promise<string[]>
) {
	const answer = await doOrSay(event, 'second-factor.own', async (person, sent) => {
		const { code } = validate(secondFactorCodeSchema, { code: sent.get('code') ?? undefined });
		return { codes: await work(person, code) };
	});
	return 'codes' in answer ? answer : fail(answer.status, { ...answer.data, of });
}

export const actions: Actions = {
	begin: (event) =>
		doOrSay(event, 'second-factor.own', async (person) => {
			await beginSetUp(person);
			redirect(303, '/second-factor');
		}),
	confirm: (event) => withCode(event, 'confirm', confirmSetUp),
	renew: (event) => withCode(event, 'renew', renewRecoveryCodes),
	off: (event) =>
		withCode(event, 'off', async (person, code) => {
			await turnOff(person, code);
			redirect(303, '/second-factor?off');
		})
};
