import { readingsQuerySchema } from '$lib/schemas/accuracy';
import { guard, orPageError } from '$lib/server/http/guard';
import { readPageQuery } from '$lib/server/http/page-query';
import { listReadings } from '$lib/server/services/accuracy/list-readings';
import { readAccuracy } from '$lib/server/services/accuracy/read-accuracy';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'books.read');
	const { query, leftOut } = readPageQuery(readingsQuerySchema, event.url);
	const [accuracy, page] = await Promise.all([
		orPageError(readAccuracy(person)),
		orPageError(listReadings(person, query))
	]);
	return { query, leftOut, accuracy, page };
};
