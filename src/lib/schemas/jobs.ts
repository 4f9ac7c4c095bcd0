import { z } from 'zod';
import { idSchema, optionalEmail, optionalWords, versionSchema, words } from './fields';
import { hotDayFields } from './places';
import { vehicleInputSchema } from './vehicles';
import { VERDICTS } from './verdicts';

export const JOB_STAGES = ['survey', 'assessed', 'recommended', 'sent', 'acknowledged'] as const;
export type JobStage = (typeof JOB_STAGES)[number];

/** A new job brings its customer and vehicle with it: one form, one save. */
export const newJobSchema = z.object({
	customerName: words('Customer name', 120),
	customerEmail: optionalEmail('Customer e-mail'),
	customerPhone: optionalWords('Customer phone', 40),
	...vehicleInputSchema.shape,
	note: optionalWords('Note', 1_000)
});
export type NewJob = z.infer<typeof newJobSchema>;

/** Another job on a vehicle that the shop knows. */
export const repeatJobSchema = z.object({ vehicleId: idSchema, note: optionalWords('Note', 1_000) });

/** The battery that is to be fitted. */
export const jobBatterySchema = z.object({ batteryRecordId: idSchema, version: versionSchema });
/** The place and the hot day to plan for there; the place's own figures unless changed. */
export const jobClimateSchema = z.object({ placeId: idSchema, ...hotDayFields, version: versionSchema });
export type JobClimate = z.infer<typeof jobClimateSchema>;

export const JOB_SORTS = ['updated', 'number', 'customer', 'headroom'] as const;
export type JobSort = (typeof JOB_SORTS)[number];

export const jobQuerySchema = z.object({
	search: z
		.string()
		.trim()
		.max(80)
		.default('')
		.meta({ description: 'Part of a customer, make, model or job number' }),
	verdict: z.enum(VERDICTS).optional(),
	stage: z.enum(JOB_STAGES).optional(),
	zone: z.string().max(3).optional().meta({ description: 'Climate class of the place' }),
	sort: z.enum(JOB_SORTS).default('updated'),
	order: z.enum(['up', 'down']).default('down'),
	cursor: z.string().max(400).optional().meta({ description: 'Where the page before ended' }),
	limit: z.coerce.number().int().min(1).max(100).default(20)
});
export type JobQuery = z.infer<typeof jobQuerySchema>;

export const jobRowSchema = z.object({
	id: z.number().int(),
	number: z.number().int(),
	customerName: z.string(),
	vehicle: z.string(),
	battery: z.string().nullable(),
	place: z.string().nullable(),
	climateZone: z.string().nullable(),
	stage: z.enum(JOB_STAGES),
	verdict: z.enum(VERDICTS).nullable(),
	headroomK: z.number().nullable(),
	updatedAt: z.iso.datetime()
});
export type JobRow = z.infer<typeof jobRowSchema>;

export const jobPageSchema = z.object({
	rows: z.array(jobRowSchema),
	total: z.number().int(),
	next: z.string().nullable()
});
export type JobPage = z.infer<typeof jobPageSchema>;
