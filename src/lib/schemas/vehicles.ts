import { z } from 'zod';
import { editedSchema, measure, optionalWords, wholeNumber, words } from './fields';

export const ENGINE_LAYOUTS = ['inline', 'vee', 'flat', 'unknown'] as const;
export type EngineLayout = (typeof ENGINE_LAYOUTS)[number];

export const vehicleInputSchema = z.object({
	make: words('Make', 60),
	model: words('Model', 60),
	modelYear: wholeNumber('Year', 1950, 2050),
	registration: optionalWords('Registration', 20),
	engineLayout: z.enum(ENGINE_LAYOUTS).meta({ label: 'Engine layout' }),
	massKg: measure('Mass, loaded for touring', 'kg', 500, 12_000),
	dragAreaM2: measure(
		'Drag area',
		'm²',
		0.3,
		6,
		'Drag coefficient times frontal area: about 0.9 for a wagon, 1.35 for a tall four-wheel drive with a roof rack.'
	),
	towMassKg: measure('Trailer mass', 'kg', 0, 10_000, '0 when nothing is towed.'),
	towDragAreaM2: measure(
		'Drag area the trailer adds',
		'm²',
		0,
		6,
		'About 0.3 for a low camper trailer, 1.2 for a full-height caravan.'
	)
});
export type VehicleInput = z.infer<typeof vehicleInputSchema>;

export const vehicleSchema = editedSchema.extend({
	customerId: z.number().int(),
	...vehicleInputSchema.shape
});
export type VehicleView = z.infer<typeof vehicleSchema>;

export const vehicleQuerySchema = z.object({
	search: z
		.string()
		.trim()
		.max(80, { error: 'Search for 80 characters or fewer.' })
		.default('')
		.meta({ description: 'Parts of a registration, customer, make or model' })
});

/** A vehicle that the shop knows, with whose it is and its newest job. */
export const knownVehicleSchema = vehicleSchema.extend({
	customerName: z.string(),
	lastJobNumber: z.number().int().nullable()
});
export type KnownVehicle = z.infer<typeof knownVehicleSchema>;
