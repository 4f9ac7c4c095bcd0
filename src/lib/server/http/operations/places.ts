import { z } from 'zod';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import { placeInputSchema, placeSchema } from '$lib/schemas/places';
import { defineOperation } from '../operation';

const params = z.object({ placeId: idSchema });

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
	})
};
