import { z } from 'zod';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import { placeInputSchema, placeSchema } from '$lib/schemas/places';
import { weatherAnswerSchema } from '$lib/schemas/weather';
import { MOST_WEATHER_BYTES } from '$lib/thermal/weather';
import { defineFileOperation, defineOperation } from '../operation';

const params = z.object({ placeId: idSchema });

const yesOrNo = (byDefault: 'true' | 'false', description: string) =>
	z.enum(['true', 'false']).default(byDefault).meta({ description });

const weatherQuery = z.object({
	version: versionSchema.meta({ description: 'Of the place, as it was read' }),
	preview: yesOrNo('false', 'Only say what the file gives; nothing is saved'),
	takeHotDay: yesOrNo('true', 'The hot day, too, not the months alone'),
	takeSite: yesOrNo('false', 'Latitude, longitude and altitude, too, where the file has them'),
	fileName: z.string().max(200).default('').meta({ description: 'Of a file that is sent as the body' })
});

export const placeOperations = {
	list: defineOperation({
		id: 'listPlaces',
		method: 'GET',
		path: '/api/v1/places',
		action: 'places.read',
		summary: 'The places of the workshop and their hot days.',
		answer: z.object({ rows: z.array(placeSchema) }),
		status: 200
	}),
	create: defineOperation({
		id: 'createPlace',
		method: 'POST',
		path: '/api/v1/places',
		action: 'places.write',
		summary: 'Adds a place with its hot day and where the figures come from.',
		body: placeInputSchema,
		answer: placeSchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getPlace',
		method: 'GET',
		path: '/api/v1/places/[placeId]',
		action: 'places.read',
		summary: 'One place.',
		params,
		answer: placeSchema,
		status: 200
	}),
	update: defineOperation({
		id: 'updatePlace',
		method: 'PUT',
		path: '/api/v1/places/[placeId]',
		action: 'places.write',
		summary: 'Changes a place, if nobody changed it since it was read.',
		params,
		body: placeInputSchema.extend({ version: versionSchema }),
		answer: placeSchema,
		status: 200
	}),
	takeWeather: defineFileOperation({
		id: 'takePlaceWeather',
		method: 'POST',
		path: '/api/v1/places/[placeId]/weather',
		action: 'places.write',
		summary:
			'Takes the months and the hot day of a place from an hourly weather file, EPW or CSV; a problem tells what is wrong by line and column.',
		params,
		query: weatherQuery,
		mostFileBytes: MOST_WEATHER_BYTES,
		answer: weatherAnswerSchema,
		status: 200
	}),
	putBackWeather: defineOperation({
		id: 'putBackPlaceWeather',
		method: 'POST',
		path: '/api/v1/places/[placeId]/weather/put-back',
		action: 'places.write',
		summary: 'Puts back what the weather file replaced, if nobody changed the place since.',
		params,
		body: z.object({ version: versionSchema }),
		answer: placeSchema,
		status: 200
	})
};
