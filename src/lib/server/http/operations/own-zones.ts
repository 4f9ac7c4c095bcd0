import { z } from 'zod';
import { idSchema } from '$lib/schemas/fields';
import { ownZoneChangeSchema, ownZoneInputSchema, ownZoneSchema } from '$lib/schemas/own-zones';
import { defineOperation } from '../operation';

const params = z.object({ zoneId: idSchema });

export const ownZoneOperations = {
	list: defineOperation({
		id: 'listOwnZones',
		method: 'GET',
		path: '/api/v1/own-zones',
		action: 'review.read',
		summary: 'The zones that the workshop defined, in the order in which they take their places.',
		answer: z.object({ rows: z.array(ownZoneSchema) }),
		status: 200
	}),
	create: defineOperation({
		id: 'createOwnZone',
		method: 'POST',
		path: '/api/v1/own-zones',
		action: 'own-zones.write',
		summary: 'Adds a zone; every place falls into the first zone in order whose rule takes it.',
		body: ownZoneInputSchema,
		answer: ownZoneSchema,
		status: 201
	}),
	update: defineOperation({
		id: 'updateOwnZone',
		method: 'PUT',
		path: '/api/v1/own-zones/[zoneId]',
		action: 'own-zones.write',
		summary: 'Changes a zone, if nobody changed it since it was read.',
		params,
		body: ownZoneChangeSchema,
		answer: ownZoneSchema,
		status: 200
	}),
	remove: defineOperation({
		id: 'removeOwnZone',
		method: 'DELETE',
		path: '/api/v1/own-zones/[zoneId]',
		action: 'own-zones.write',
		summary: 'Removes a zone; its places fall into the next that takes them, or into none.',
		params,
		answer: ownZoneSchema,
		status: 200
	})
};
