import { endpoint } from '$lib/server/http/endpoint';
import { placeOperations } from '$lib/server/http/operations/places';
import { getPlace, updatePlace } from '$lib/server/services/places';

export const GET = endpoint(placeOperations.get, ({ person, params }) => getPlace(person, params.placeId));

export const PUT = endpoint(placeOperations.update, ({ person, params, body }) =>
	updatePlace(person, params.placeId, body)
);
