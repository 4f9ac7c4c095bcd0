import { fail, redirect } from '@sveltejs/kit';
import { fitInputSchema } from '$lib/schemas/fits';
import { AppError } from '$lib/server/errors';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { validate } from '$lib/server/http/validate';
import { createFit, listChoices, prepareFit, type FitChoices } from '$lib/server/services/fits';
import { listFitProblems, listHeldProblems, readFitForm, type FitDraft } from './fit-form';
import type { Actions, PageServerLoad } from './$types';

/** The traces that an address names. */
const traceIdsOf = ({ searchParams }: URL): number[] =>
	searchParams.getAll('trace').map(Number).filter(Number.isSafeInteger);

/** What the address has chosen of what there is. */
function chosenBy(url: URL, { traces, coefficients }: FitChoices) {
	const [traceIds, paths] = [traceIdsOf(url), url.searchParams.getAll('coefficient')];
	return {
		traces: traces.filter(({ id, unfit }) => unfit === '' && traceIds.includes(id)),
		coefficients: coefficients.filter(({ group, key }) => paths.includes(`${group}.${key}`))
	};
}

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'traces.write');
	const choices = await orPageError(listChoices(person, traceIdsOf(event.url)));
	const { searchParams } = event.url;
	return { choices, chosen: chosenBy(event.url, choices), isAsked: searchParams.has('choose') };
};

export const actions: Actions = {
	default: async (event) => {
		const person = guard(event, 'traces.write');
		const sent = await readPageForm(event.request);
		const draft: FitDraft = Object.fromEntries([...sent].map(([name, value]) => [name, String(value)]));
		const choices = await orPageError(listChoices(person, traceIdsOf(event.url)));
		const { traces, coefficients } = chosenBy(event.url, choices);
		const ids = traces.map(({ id }) => id);
		const made = await Promise.resolve()
			.then(async () => {
				const input = validate(fitInputSchema, readFitForm(draft, ids, coefficients));
				return createFit(person, input, await prepareFit(person, input));
			})
			.catch((error: unknown) => {
				if (error instanceof AppError) return error;
				throw error;
			});
		if (made instanceof AppError) {
			const problems = listFitProblems(made, ids, coefficients);
			const isTold = ({ path }: { path: string }) => problems.some((each) => each.path === path);
			const ofLegs = listHeldProblems(draft, traces).filter((problem) => !isTold(problem));
			return fail(made.status, { draft, problems: [...problems, ...ofLegs] });
		}
		redirect(303, `/fits/${made.id}`);
	}
};
