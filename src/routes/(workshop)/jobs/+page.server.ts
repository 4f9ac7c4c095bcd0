import { guard, orPageError } from '$lib/server/http/guard';
import { mayDo } from '$lib/server/policies';
import { listPlaces } from '$lib/server/services/places';
import { countWaitingErasures } from '$lib/server/services/waiting-erasures';
import type { PageServerLoad } from './$types';

/** The climates to choose from are those of the shop's places; the jobs themselves come through the API. */
export const load: PageServerLoad = async (event) => {
	const person = guard(event, 'jobs.read');
	const places = await orPageError(listPlaces(person));
	const mayDecide = mayDo(person, 'erasures.decide');
	return {
		zones: [...new Set(places.map((place) => place.climateZone))].sort(),
		waiting: mayDecide ? await orPageError(countWaitingErasures(person)) : null
	};
};
