import { z } from 'zod';
import { VERDICTS } from './verdicts';

/** Zones by climate class, or those that the shop defined. */
export const ZONE_KINDS = ['climate', 'own'] as const;
export type ZoneKind = (typeof ZONE_KINDS)[number];

/** Where no zone is known: a job without a place, or a place that no zone of the shop's own takes. */
export const NO_ZONE = 'none';

/** Whether dark days can be predicted: yes; not until the outlook is worked out; or nothing there ever switches off. */
export type Chance = 'known' | 'unknown' | 'never';
export const SHEET_STATES = ['acknowledged', 'waiting', 'missing'] as const;
export type SheetState = (typeof SHEET_STATES)[number];

/** What a list is narrowed to. */
export const REVIEW_LISTS = ['overdue', 'overrides', 'waiting', 'missing', 'gone-dark'] as const;
export type ReviewList = (typeof REVIEW_LISTS)[number];

const month = (label: string) =>
	z
		.string()
		.regex(/^20\d{2}-(0[1-9]|1[0-2])$/, { error: `${label} must be a month, such as 2026-03.` })
		.optional();

export const reviewFilterSchema = z.object({
	kind: z
		.enum(ZONE_KINDS)
		.default('climate')
		.meta({ label: 'Kind of zone', description: 'Climate classes, or the shop’s own zones' }),
	verdict: z.enum(VERDICTS).optional().meta({ label: 'Verdict' }),
	since: month('Fitted since').meta({ description: 'Fitted in this month or later' }),
	until: month('Fitted until').meta({ description: 'Fitted in this month or earlier' })
});
export type ReviewFilter = z.infer<typeof reviewFilterSchema>;

const zone = z
	.string()
	.regex(/^(none|[A-Z][A-Za-z]{1,2}|\d{1,15})$/, { error: 'There is no such zone.' })
	.optional()
	.meta({ description: 'A climate class, the number of an own zone, or "none"' });

export const reviewScopeSchema = reviewFilterSchema.extend({
	zone,
	place: z.coerce.number().int().positive().max(Number.MAX_SAFE_INTEGER).optional().meta({ label: 'Place' })
});
export type ReviewScope = z.infer<typeof reviewScopeSchema>;

export const REVIEW_SORTS = ['newest', 'oldest', 'longest-due'] as const;
export type ReviewSort = (typeof REVIEW_SORTS)[number];

export const reviewListQuerySchema = reviewScopeSchema.extend({
	list: z.enum(REVIEW_LISTS).optional().meta({ label: 'List', description: 'Only these' }),
	sort: z
		.enum(REVIEW_SORTS)
		.optional()
		.meta({ label: 'Order', description: 'Newest first, and overdue looks the longest due first' }),
	cursor: z.string().max(400).optional().meta({ description: 'Where the page before ended' }),
	limit: z.coerce.number().int().min(1).max(200).default(50)
});
export type ReviewListQuery = z.infer<typeof reviewListQuerySchema>;

const count = z.number().int().min(0);

/** Reported dark days as a multiple of those predicted, with the range that holds it 19 times in 20. */
export const ratioSchema = z.object({ value: z.number(), low: z.number(), high: z.number() });
export type Ratio = z.infer<typeof ratioSchema>;

export const reviewFiguresSchema = z.object({
	installations: count,
	verdicts: z.record(z.enum(VERDICTS), count),
	chance: z.object({ known: count, unknown: count, never: count }),
	predictedDays: z.number(),
	reportedDays: count.meta({ description: 'Days reported dark, of the installations whose chance is known' }),
	notHeatDays: count.meta({ description: 'Of those, the days that heat hardly explains' }),
	reportedElsewhere: count.meta({ description: 'Days reported dark of the other installations' }),
	ratio: ratioSchema.nullable(),
	overdue: count.meta({ description: 'Installations with a follow-up past its date' }),
	overrides: count,
	sheetsWaiting: count.meta({ description: 'With a sheet that nobody has acknowledged' }),
	sheetsMissing: count.meta({ description: 'Without a standing sheet' })
});
export type ReviewFigures = z.infer<typeof reviewFiguresSchema>;

export const reviewZoneSchema = reviewFiguresSchema.extend({ zone: z.string(), name: z.string() });
export type ReviewZone = z.infer<typeof reviewZoneSchema>;

export const reviewZonesSchema = z.object({
	on: z.iso.date().meta({ description: 'The day up to which is counted' }),
	rows: z.array(reviewZoneSchema),
	all: reviewFiguresSchema
});
export type ReviewZones = z.infer<typeof reviewZonesSchema>;

export const reviewInstallationSchema = z.object({
	installationId: z.number().int(),
	mountId: z.number().int(),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	mount: z.string(),
	customer: z.string(),
	vehicle: z.string(),
	place: z.string().nullable(),
	zone: z.string(),
	fittedOn: z.iso.date(),
	verdict: z.enum(VERDICTS),
	chemistry: z.string(),
	chance: z.enum(['known', 'unknown', 'never']),
	expectedDaysAYear: z.number().nullable(),
	predictedDays: z.number().nullable(),
	reportedDays: count,
	nextDueOn: z.iso.date().nullable(),
	overdueDays: count,
	override: z
		.object({
			againstVerdict: z.boolean(),
			againstMaker: z.boolean().meta({ description: 'The maker of the battery does not allow it there' }),
			decidedBy: z.string(),
			reason: z.string(),
			enteredBy: z.string().nullable().meta({ description: 'Where that is somebody else' })
		})
		.nullable(),
	later: z
		.object({
			id: z.number().int(),
			number: z.number().int(),
			on: z.iso.date(),
			recommendedBy: z.string()
		})
		.nullable()
		.meta({ description: 'The newest recommendation that was made after the one it was fitted under' }),
	sheetState: z.enum(SHEET_STATES),
	sheetSentOn: z.iso.date().nullable()
});
export type ReviewInstallation = z.infer<typeof reviewInstallationSchema>;

export const reviewPageSchema = z.object({
	rows: z.array(reviewInstallationSchema),
	total: count,
	next: z.string().nullable()
});
export type ReviewPage = z.infer<typeof reviewPageSchema>;

export const trendMonthSchema = z.object({
	month: z.string(),
	fitted: z.record(z.enum(VERDICTS), count),
	predictedDays: z.number(),
	reportedDays: count
});
export type TrendMonth = z.infer<typeof trendMonthSchema>;

export const reviewTrendsSchema = z.object({ on: z.iso.date(), months: z.array(trendMonthSchema) });
export type ReviewTrends = z.infer<typeof reviewTrendsSchema>;

export const reviewPlaceSchema = z.object({
	placeId: z.number().int(),
	name: z.string(),
	zone: z.string(),
	latitudeDeg: z.number(),
	longitudeDeg: z.number(),
	installations: count,
	verdicts: z.record(z.enum(VERDICTS), count),
	goneDark: count.meta({ description: 'Installations that were reported dark at least once' })
});
export type ReviewPlace = z.infer<typeof reviewPlaceSchema>;

export const reviewMapSchema = z.object({
	places: z.array(reviewPlaceSchema),
	withoutPlace: count
});
export type ReviewMap = z.infer<typeof reviewMapSchema>;
