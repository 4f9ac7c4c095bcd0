import { redirect } from '@sveltejs/kit';
import { changesQuerySchema, rerunMoveSchema } from '$lib/schemas/reruns';
import { readPageForm } from '$lib/server/http/forms';
import { guard, orPageError } from '$lib/server/http/guard';
import { pageId } from '$lib/server/http/page-id';
import { pageQuery } from '$lib/server/http/page-query';
import { validate } from '$lib/server/http/validate';
import { listChanges, listLeft } from '$lib/server/services/reruns/changes';
import { getRerun, moveRerun } from '$lib/server/services/reruns/reruns';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'reruns.read');
	const rerunId = pageId(event.params.rerunId);
	const rerun = await orPageError(getRerun(person, rerunId));
	const { page } = await pageQuery(changesQuerySchema, event.url);
	const [changes, left] = await Promise.all([
		orPageError(listChanges(person, rerunId, page)),
		orPageError(listLeft(person, rerunId))
	]);
	return { rerun, changes, left, page };
};

export const actions: Actions = {
	move: async (event) => {
		const person = guard(event, 'reruns.write');
		const rerunId = pageId(event.params.rerunId);
		// Whose it is comes before what is to be done with it.
		await orPageError(getRerun(person, rerunId));
		const sent = Object.fromEntries(await readPageForm(event.request));
		await orPageError(
			Promise.resolve().then(() => moveRerun(person, rerunId, validate(rerunMoveSchema, sent)))
		);
		redirect(303, `/reruns/${rerunId}`);
	}
};
