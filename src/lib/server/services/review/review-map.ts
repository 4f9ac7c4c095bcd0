import type { SignedInPerson } from '$lib/schemas/people';
import type { ReviewFilter, ReviewMap, ReviewPlace } from '$lib/schemas/review';
import { Place } from '../../db/models';
import { allow } from '../../policies';
import { listCounts, type CountRow } from './read-sums';
import { countVerdicts } from './review-zones';

/** Where the installations tour, the place with the most first. */
export async function reviewMap(person: SignedInPerson, filter: ReviewFilter): Promise<ReviewMap> {
	allow(person, 'review.read');
	const { workshopId } = person;
	const byPlace = new Map<number, CountRow[]>();
	for (const row of await listCounts(workshopId, filter, 'place')) {
		const placeId = Number(row.group);
		byPlace.set(placeId, [...(byPlace.get(placeId) ?? []), row]);
	}
	const total = (rows: readonly CountRow[]): number => rows.reduce((sum, row) => sum + row.installations, 0);
	const places = await Place.findAll({ where: { id: [...byPlace.keys()], workshopId } });
	const rows = places.map((place): ReviewPlace => {
		const sums = byPlace.get(place.id)!;
		return {
			placeId: place.id,
			name: place.name,
			zone: place.computedZone ?? place.climateZone,
			latitudeDeg: place.latitudeDeg,
			longitudeDeg: place.longitudeDeg,
			installations: total(sums),
			verdicts: countVerdicts(sums),
			goneDark: sums.reduce((sum, { goneDark }) => sum + goneDark, 0)
		};
	});
	return {
		places: rows.sort((a, b) => b.installations - a.installations || a.placeId - b.placeId),
		withoutPlace: total(byPlace.get(0) ?? [])
	};
}
