import { redirect } from '@sveltejs/kit';
import { guard, orPageError } from '$lib/server/http/guard';
import { checkOwnTrail, lastCheck } from '$lib/server/services/audit-check';
import { listAudit, listAuditChoices } from '$lib/server/services/audit-list';
import { parseAsked, readAuditAsked } from './audit-query';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'audit.read');
	const asked = readAuditAsked(event.url.searchParams);
	const parsed = parseAsked(asked);
	const [choices, check] = await orPageError(Promise.all([listAuditChoices(person), lastCheck(person)]));
	if ('problems' in parsed) return { asked, choices, check, page: null, problems: parsed.problems };
	return { asked, choices, check, page: await orPageError(listAudit(person, parsed.query)), problems: [] };
};

export const actions: Actions = {
	check: async (event) => {
		const person = guard(event, 'audit.read');
		await orPageError(checkOwnTrail(person));
		redirect(303, '/audit#check');
	}
};
