import { z } from 'zod';
import { batterySchema, CHEMISTRIES } from './batteries';
import { customerSchema } from './customers';
import { dayPlanSchema } from './day-plans';
import {
	editedSchema,
	idSchema,
	optionalEmail,
	optionalPhone,
	optionalWords,
	versionSchema,
	wholeNumber,
	words
} from './fields';
import { monthList } from './months';
import { mountSchema } from './mounts';
import { CLIMATE_ZONES, hotDayFields, placeSchema } from './places';
import { vehicleInputSchema, vehicleSchema } from './vehicles';
import { VERDICTS } from './verdicts';

export const JOB_STAGES = ['survey', 'assessed', 'recommended', 'sent', 'acknowledged'] as const;
export type JobStage = (typeof JOB_STAGES)[number];

/** A new job brings its customer and vehicle with it: one form, one save. */
export const newJobSchema = z.object({
	customerName: words('Customer name', 120),
	customerEmail: optionalEmail('Customer e-mail'),
	customerPhone: optionalPhone('Customer phone'),
	...vehicleInputSchema.shape,
	note: optionalWords('Note', 1_000)
});
export type NewJob = z.infer<typeof newJobSchema>;

/** Another job on a vehicle that the shop knows. */
export const repeatJobSchema = z.object({ vehicleId: idSchema, note: optionalWords('Note', 1_000) });
export type RepeatJob = z.infer<typeof repeatJobSchema>;

/** The battery that is to be fitted. */
export const jobBatterySchema = z.object({
	batteryRecordId: idSchema.meta({ label: 'Battery' }),
	version: versionSchema
});
export type JobBattery = z.infer<typeof jobBatterySchema>;

export const DAYS_ON_ROAD = 'Days on the road';
/** Of a job that says nothing else: every second weekend. */
export const USUAL_DAYS_ON_ROAD = 4;
/** One month, or any month when no name is given. */
export const daysOnRoadField = (month: string | null = null) =>
	wholeNumber(month === null ? DAYS_ON_ROAD : `${month}, ${DAYS_ON_ROAD.toLowerCase()}`, 0, 31);

/** The place and the hot day to plan for there; the place's own figures unless changed. */
export const jobClimateSchema = z.object({
	placeId: idSchema.meta({ label: 'Place' }),
	...hotDayFields,
	daysOnRoad: monthList(daysOnRoadField(), DAYS_ON_ROAD).meta({
		description: `January to December; null for the usual ${USUAL_DAYS_ON_ROAD} each month`
	}),
	version: versionSchema
});
export type JobClimate = z.infer<typeof jobClimateSchema>;

/** Each way to order the list, as a person asks for it. */
export const JOB_SORTS = [
	'newest',
	'oldest',
	'highest-number',
	'lowest-number',
	'customer-a-to-z',
	'customer-z-to-a',
	'least-headroom',
	'most-headroom'
] as const;
export type JobSort = (typeof JOB_SORTS)[number];

export const jobQuerySchema = z.object({
	search: z
		.string()
		.trim()
		.max(80, { error: 'Search for 80 characters or fewer.' })
		.default('')
		.meta({ description: 'Parts of a customer, make, model, registration or job number' }),
	verdict: z.enum(VERDICTS).optional(),
	stage: z.enum(JOB_STAGES).optional(),
	zone: z.enum(CLIMATE_ZONES).optional().meta({ description: 'Climate class of the place' }),
	sort: z.enum(JOB_SORTS).default('newest'),
	cursor: z.string().max(1_200).optional().meta({ description: 'Where the page before ended' }),
	limit: z.coerce.number().int().min(1).max(100).default(20)
});
export type JobQuery = z.infer<typeof jobQuerySchema>;

/** Of the battery that the verdict is about: it tells how the verdict is worded. */
const assessedChemistry = z.enum(CHEMISTRIES);

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
	assessedChemistry,
	headroomK: z.number().nullable(),
	openQuestions: z.number().int().meta({ description: 'Questions of the customer without an answer' }),
	updatedAt: z.iso.datetime()
});
export type JobRow = z.infer<typeof jobRowSchema>;

export const jobPageSchema = z.object({
	rows: z.array(jobRowSchema),
	total: z.number().int(),
	next: z.string().nullable()
});
export type JobPage = z.infer<typeof jobPageSchema>;

/** What an assessment rests on, and what may have changed since. */
export const ASSESSED_PARTS = [
	...(['vehicle', 'battery', 'place', 'hot-day', 'touring', 'day-plan', 'survey', 'cable'] as const),
	...(['book', 'engine'] as const)
] as const;
export type AssessedPart = (typeof ASSESSED_PARTS)[number];

/** Where a mount stands: its newest assessment, and what the job has changed since then. */
export const mountStandingSchema = z.object({
	mountId: z.number().int(),
	assessmentId: z.number().int(),
	chemistry: z.enum(CHEMISTRIES),
	verdict: z.enum(VERDICTS),
	headroomK: z.number(),
	assessedAt: z.iso.datetime(),
	changedSince: z.array(z.enum(ASSESSED_PARTS))
});
export type MountStanding = z.infer<typeof mountStandingSchema>;

export const jobSchema = editedSchema.extend({
	number: z.number().int(),
	customer: customerSchema,
	vehicle: vehicleSchema,
	battery: batterySchema.nullable(),
	place: placeSchema.nullable(),
	hotDay: z.object(hotDayFields).nullable(),
	daysOnRoad: z.array(z.number().int()).nullable(),
	stage: z.enum(JOB_STAGES),
	verdict: z.enum(VERDICTS).nullable(),
	assessedChemistry,
	headroomK: z.number().nullable(),
	note: z.string(),
	createdAt: z.iso.datetime(),
	updatedAt: z.iso.datetime(),
	mounts: z.array(mountSchema),
	standings: z.array(mountStandingSchema),
	dayPlan: dayPlanSchema.nullable()
});
export type JobView = z.infer<typeof jobSchema>;
