import { z } from 'zod';
import { idSchema, versionSchema } from '$lib/schemas/fields';
import {
	knownVehicleSchema,
	vehicleInputSchema,
	vehicleQuerySchema,
	vehicleSchema
} from '$lib/schemas/vehicles';
import { defineOperation } from '../operation';

const params = z.object({ vehicleId: idSchema });

export const vehicleOperations = {
	find: defineOperation({
		id: 'findVehicles',
		method: 'GET',
		path: '/api/v1/vehicles',
		action: 'vehicles.read',
		summary: 'Vehicles that the workshop knows, newest first, at most 20.',
		query: vehicleQuerySchema,
		answer: z.object({ rows: z.array(knownVehicleSchema) }),
		status: 200
	}),
	get: defineOperation({
		id: 'getVehicle',
		method: 'GET',
		path: '/api/v1/vehicles/[vehicleId]',
		action: 'vehicles.read',
		summary: 'One vehicle.',
		params,
		answer: vehicleSchema,
		status: 200
	}),
	update: defineOperation({
		id: 'updateVehicle',
		method: 'PUT',
		path: '/api/v1/vehicles/[vehicleId]',
		action: 'vehicles.write',
		summary: 'Changes a vehicle, if nobody changed it since it was read.',
		params,
		body: vehicleInputSchema.extend({ version: versionSchema }),
		answer: vehicleSchema,
		status: 200
	})
};
