import { fileEndpoint } from '$lib/server/http/endpoint';
import { placeOperations } from '$lib/server/http/operations/places';
import { previewWeather, takeWeather } from '$lib/server/services/place-weather';
import { getPlace } from '$lib/server/services/places';

export const POST = fileEndpoint(placeOperations.takeWeather, {
	find: (person, { placeId }) => getPlace(person, placeId),
	nameOf: ({ fileName }) => fileName,
	handle: async ({ person, params: { placeId }, query, file }) => {
		const { place, reading } = await previewWeather(person, placeId, file);
		if (query.preview === 'true') return { saved: false, reading, place };
		const changed = await takeWeather(person, placeId, reading, {
			version: query.version,
			takeHotDay: query.takeHotDay === 'true',
			takeSite: query.takeSite === 'true'
		});
		return { saved: true, reading, place: changed };
	}
});
