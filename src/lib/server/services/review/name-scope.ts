import type { ScopeNames } from '$lib/format/review-conditions';
import type { SignedInPerson } from '$lib/schemas/people';
import type { ReviewScope } from '$lib/schemas/review';
import { Place } from '../../db/models';
import { allow } from '../../policies';
import { nameZones } from './review-zones';

const findPlaceName = async (workshopId: number, id: number): Promise<string> =>
	(await Place.findOne({ where: { id, workshopId } }))?.name ?? `number ${id}, which there is not`;

/** What the zone and the place that a page is narrowed to are called. */
export async function nameScope(
	person: SignedInPerson,
	{ kind, zone, place }: Pick<ReviewScope, 'kind' | 'zone' | 'place'>
): Promise<ScopeNames> {
	const { workshopId } = allow(person, 'review.read');
	const [zoneName, placeName] = await Promise.all([
		zone === undefined ? null : nameZones(workshopId, kind).then(({ nameOf }) => nameOf(zone)),
		place === undefined ? null : findPlaceName(workshopId, place)
	]);
	return { zoneName, placeName };
}
