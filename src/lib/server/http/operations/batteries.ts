import { z } from 'zod';
import { batteryChangeSchema, batteryInputSchema, batterySchema } from '$lib/schemas/batteries';
import { idSchema } from '$lib/schemas/fields';
import { defineOperation } from '../operation';

const params = z.object({ batteryId: idSchema });

export const batteryOperations = {
	list: defineOperation({
		id: 'listBatteries',
		method: 'GET',
		path: '/api/v1/batteries',
		action: 'batteries.read',
		summary: 'The data-sheet records of the workshop.',
		answer: z.object({ rows: z.array(batterySchema) }),
		status: 200
	}),
	create: defineOperation({
		id: 'createBattery',
		method: 'POST',
		path: '/api/v1/batteries',
		action: 'batteries.write',
		summary: 'Adds a data-sheet record, with what the maker says about under-bonnet use.',
		body: batteryInputSchema,
		answer: batterySchema,
		status: 201
	}),
	get: defineOperation({
		id: 'getBattery',
		method: 'GET',
		path: '/api/v1/batteries/[batteryId]',
		action: 'batteries.read',
		summary: 'One data-sheet record.',
		params,
		answer: batterySchema,
		status: 200
	}),
	update: defineOperation({
		id: 'updateBattery',
		method: 'PUT',
		path: '/api/v1/batteries/[batteryId]',
		action: 'batteries.write',
		summary: 'Changes a data-sheet record, if nobody changed it since it was read.',
		params,
		body: batteryChangeSchema,
		answer: batterySchema,
		status: 200
	})
};
