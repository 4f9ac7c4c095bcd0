import { endpoint } from '$lib/server/http/endpoint';
import { ownZoneOperations } from '$lib/server/http/operations/own-zones';
import { createOwnZone, listOwnZones } from '$lib/server/services/review/own-zones';

export const GET = endpoint(ownZoneOperations.list, async ({ person }) => ({
	rows: await listOwnZones(person)
}));

export const POST = endpoint(ownZoneOperations.create, ({ person, body }) => createOwnZone(person, body));
