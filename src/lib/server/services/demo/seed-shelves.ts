import type { Transaction } from 'sequelize';
import { batteryInputSchema } from '$lib/schemas/batteries';
import { placeInputSchema } from '$lib/schemas/places';
import batteries from '../../../../../seeds/demo-batteries.json';
import places from '../../../../../seeds/demo-places.json';
import { createBattery } from '../batteries';
import { createFirstBook } from '../books';
import { createPlace } from '../places';
import type { Crew } from './seed-people';

/** What every job of a workshop draws on: its places, its battery records and its first coefficient book. */
export async function seedShelves({ manager, workshopId }: Crew, transaction: Transaction): Promise<void> {
	for (const place of places) await createPlace(manager, placeInputSchema.parse(place));
	for (const battery of batteries) await createBattery(manager, batteryInputSchema.parse(battery));
	await createFirstBook(workshopId, transaction);
}
