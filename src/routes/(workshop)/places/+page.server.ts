import { guard, orPageError } from '$lib/server/http/guard';
import { listPlaces } from '$lib/server/services/places';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'places.read');
	return { places: await orPageError(listPlaces(person)) };
};
