import { endpoint } from '$lib/server/http/endpoint';
import { placeOperations } from '$lib/server/http/operations/places';
import { putBackWeather } from '$lib/server/services/place-weather';

export const POST = endpoint(placeOperations.putBackWeather, ({ person, params, body }) =>
	putBackWeather(person, params.placeId, body.version)
);
