import { z } from 'zod';
import {
	DATE_ORDERS,
	DECIMALS,
	DELIMITERS,
	TRACE_CHANNELS,
	TRACE_UNITS,
	type MeasuredAmbient,
	type TraceLeg,
	type TraceReport,
	type TraceUnit
} from '../thermal/traces';
import { measure, versionSchema, words } from './fields';

export const TRACE_STATES = ['described', 'reading', 'read', 'failed'] as const;
export type TraceState = (typeof TRACE_STATES)[number];

export const UNIT_NAMES = Object.keys(TRACE_UNITS) as TraceUnit[];

const columnNumber = z.number().int().min(1).max(256);
const countedTime = <K extends string>(kind: K) => z.object({ kind: z.literal(kind), column: columnNumber });
const timeZone = z.string().max(60).meta({ description: 'IANA name, such as Australia/Darwin' });
/** What counts from 1970 says the instant; the time of day is that of the zone, UTC where none is said. */
const epochTime = <K extends string>(kind: K) => countedTime(kind).extend({ timeZone: timeZone.optional() });

/** How a logger writes: which column is what, and how it tells the time. */
export const traceMappingSchema = z.object({
	version: z.literal(1),
	delimiter: z.enum(DELIMITERS),
	decimal: z.enum(DECIMALS),
	time: z.discriminatedUnion('kind', [
		epochTime('epoch-s'),
		epochTime('epoch-ms'),
		countedTime('elapsed-s'),
		countedTime('elapsed-min'),
		z.object({
			kind: z.literal('calendar'),
			column: columnNumber,
			clockColumn: columnNumber.nullable(),
			order: z.enum(DATE_ORDERS),
			timeZone
		}),
		z.object({
			kind: z.literal('time-of-day'),
			column: columnNumber,
			firstDay: z.iso.date().nullable(),
			timeZone
		})
	]),
	columns: z
		.array(
			z.object({
				column: columnNumber,
				channel: z.enum(TRACE_CHANNELS),
				unit: z.enum(UNIT_NAMES),
				reversed: z.boolean().default(false).meta({ description: 'Current counts while the battery gives' })
			})
		)
		.max(TRACE_CHANNELS.length)
});
export type TraceMappingInput = z.infer<typeof traceMappingSchema>;

/** What the first rows say of a file, for somebody to confirm or put right. */
export const traceProposalSchema = z.object({
	headerLine: z.number().int().nullable(),
	firstRowLine: z.number().int(),
	columns: z.array(z.object({ number: z.number().int(), name: z.string() })),
	/** As they stand in the file. */
	firstRows: z.array(z.array(z.string())),
	timeWhy: z.string(),
	notes: z.array(z.string()),
	knownSince: z.iso
		.datetime()
		.nullable()
		.meta({ description: 'When the mapping of this logger was confirmed last; null for a new one' })
});
export type TraceProposalView = z.infer<typeof traceProposalSchema>;

export const traceFailureSchema = z.object({
	message: z.string(),
	line: z.number().int().nullable(),
	column: z.number().int().nullable()
});
export type TraceFailure = z.infer<typeof traceFailureSchema>;

export const traceSpanSchema = z.object({
	timeBase: z.enum(['utc', 'time-of-day', 'elapsed']),
	timeZone: z.string().nullable(),
	startS: z.number(),
	endS: z.number(),
	stepS: z.number().meta({ description: 'Length of the bins that are kept' }),
	channels: z.array(z.enum(TRACE_CHANNELS))
});
export type TraceSpan = z.infer<typeof traceSpanSchema>;

export const LEG_KINDS_OF_TRACE = ['driving', 'stopped'] as const;
const traceLegSchema = z.object({
	startS: z.number(),
	endS: z.number(),
	kind: z.enum(LEG_KINDS_OF_TRACE),
	meanSpeedKmh: z.number().nullable(),
	why: z.string()
}) satisfies z.ZodType<TraceLeg>;

export const traceRowSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	mountId: z.number().int(),
	mountLetter: z.string(),
	mountName: z.string(),
	name: z.string(),
	isSynthetic: z.boolean().meta({ description: 'Made up, not measured' }),
	state: z.enum(TRACE_STATES),
	bytes: z.number().int(),
	sha256: z.string().meta({ description: 'Of the file as it came' }),
	uploadedBy: z.string(),
	uploadedAt: z.iso.datetime(),
	readAt: z.iso.datetime().nullable(),
	span: traceSpanSchema.nullable(),
	rowsKept: z.number().int().nullable(),
	startHour: z
		.number()
		.nullable()
		.meta({ description: 'Clock hour at which it begins; null where nobody knows' }),
	version: versionSchema
});
export type TraceRow = z.infer<typeof traceRowSchema>;

export const traceSchema = traceRowSchema.extend({
	proposal: traceProposalSchema,
	mapping: traceMappingSchema,
	failure: traceFailureSchema.nullable(),
	report: z.custom<TraceReport>().nullable().meta({ type: 'object' }),
	legs: z.array(traceLegSchema),
	legsBy: z.string().meta({ description: 'Empty while they are as they were proposed' }),
	sentBefore: z
		.object({
			id: z.number().int(),
			name: z.string(),
			jobNumber: z.number().int(),
			mountLetter: z.string()
		})
		.nullable()
		.meta({ description: 'The trace of the same file that was sent in first; null where there is none' })
});
export type TraceView = z.infer<typeof traceSchema>;

const startHour = measure('Starts at', 'h', 0, 23.999).nullable();

/** A mapping that somebody confirms; the file is then read with it. */
export const traceMappingChangeSchema = z.object({
	mapping: traceMappingSchema,
	isSynthetic: z.boolean().default(false),
	startHour: startHour.default(null),
	version: versionSchema
});
export type TraceMappingChange = z.infer<typeof traceMappingChangeSchema>;

export const MOST_CURVE_POINTS = 1_000;
export const curveQuerySchema = z.object({
	channels: z.string().max(200).optional().meta({ description: 'Parted by commas; all that the trace has' }),
	fromS: z.coerce.number().optional(),
	toS: z.coerce.number().optional(),
	points: z.coerce.number().int().min(1).max(MOST_CURVE_POINTS).default(600)
});
export type CurveQuery = z.infer<typeof curveQuerySchema>;

const figures = z.array(z.number().nullable());
export const channelCurveSchema = z.object({
	channel: z.enum(TRACE_CHANNELS),
	timeS: z.array(z.number()).meta({ description: 'Middle of each point' }),
	mean: figures,
	min: figures,
	max: figures
});
export type ChannelCurve = z.infer<typeof channelCurveSchema>;

export const curveSchema = z.object({
	fromS: z.number(),
	toS: z.number(),
	stepS: z.number().meta({ description: 'What each point stands for' }),
	curves: z.array(channelCurveSchema)
});
export type CurveView = z.infer<typeof curveSchema>;

export const MOST_TRACE_LEGS = 200;
/** Faster no leg is driven, km/h. */
export const MOST_LEG_KMH = 200;

/** Legs follow each other: each begins where the one before ends, the first with the trace. */
export const legsChangeSchema = z.object({
	legs: z
		.array(
			z.object({
				endS: z.number(),
				kind: z.enum(LEG_KINDS_OF_TRACE),
				speedKmh: measure('Mean speed', 'km/h', 0, MOST_LEG_KMH)
					.nullable()
					.default(null)
					.meta({ description: 'Taken only where the trace does not tell' })
			})
		)
		.min(1)
		.max(MOST_TRACE_LEGS),
	startHour: startHour.optional(),
	version: versionSchema
});
export type LegsChange = z.infer<typeof legsChangeSchema>;
export type LegsInput = z.input<typeof legsChangeSchema>['legs'];

/** What no trace tells, for the day plan of a job. */
export const tracePlanSchema = z.object({
	name: words('Name of the day', 80),
	startSoc: measure('State of charge at the start', '%', 0, 100),
	chargerMaxA: measure('Charger', 'A', 0, 300),
	/** The version of the job's plan that was seen; null where it had none. */
	version: z.coerce.number().int().min(0).nullable()
});
export type TracePlan = z.infer<typeof tracePlanSchema>;

/** The air outside as it was measured, as near as a design day comes to it. */
export interface TraceAir {
	tMaxC: number;
	dailyRangeK: number;
	offByK: number;
}

/** Why there is no design day in a trace: no air, or as the engine says. */
export interface NoTraceAir {
	whyNone: 'no-air' | NonNullable<MeasuredAmbient['whyNone']>;
}
