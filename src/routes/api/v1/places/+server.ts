import { endpoint } from '$lib/server/http/endpoint';
import { placeOperations } from '$lib/server/http/operations/places';
import { createPlace, listPlaces } from '$lib/server/services/places';

export const GET = endpoint(placeOperations.list, async ({ person }) => ({ rows: await listPlaces(person) }));

export const POST = endpoint(placeOperations.create, ({ person, body }) => createPlace(person, body));
