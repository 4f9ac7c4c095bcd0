import { placeInputSchema } from '$lib/schemas/places';
import places from '../../../../../seeds/demo-places.json';
import { createPlace } from '../places';
import type { Crew } from './seed-people';

export async function seedPlaces({ manager }: Crew): Promise<void> {
	for (const place of places) await createPlace(manager, placeInputSchema.parse(place));
}
