import { z } from 'zod';
import { STANDS } from '../thermal/field';
import { POSITION_KINDS } from '../thermal/survey';
import { ratioSchema } from './review';

/** What was measured or reported afterwards. */
export const READING_KINDS = ['label', 'trace', 'cut-out', 'capacity'] as const;
export type ReadingKind = (typeof READING_KINDS)[number];

/** Of these the error is in kelvin. */
export const TEMPERATURE_KINDS = ['label', 'trace'] as const satisfies readonly ReadingKind[];

/**
 * Why a reading does not count: struck out; put right by a later one of the same day; with those before it, outside of all that is held
 * possible; of a trace: the book that foretold it had been fitted to it, the same file is there already, its logger told no
 * date, or not the outside air, or nobody has confirmed its legs.
 */
export const LEFT_OUT = [
	...(['struck', 'noted-again', 'fits-nothing'] as const),
	...(['fitted-to', 'sent-again', 'no-date', 'no-air', 'legs-open'] as const)
] as const;
export type LeftOut = (typeof LEFT_OUT)[number];

/** With fewer, a group says that it is too few to tell. */
export const FEWEST_READINGS = 5;

const count = z.number().int().min(0);
const interval = z.object({ low: z.number(), high: z.number() });

/** How far readings of one kind lie from what was predicted of them: kelvin, or shares of the capacity. */
export const errorFiguresSchema = z.object({
	readings: count.meta({ description: 'Measured to a number' }),
	bias: z
		.number()
		.nullable()
		.meta({ description: 'Mean of measured less predicted; null where there are too few to tell' }),
	rootMeanSquare: z.number().nullable(),
	inside: count.meta({ description: 'Readings inside the stated band' }),
	insideShare: interval
		.extend({ value: z.number() })
		.nullable()
		.meta({ description: 'With its exact 95 % interval; null where there are too few to tell' }),
	oneSided: count.meta({ description: 'Readings that say a side only: hotter than, not as hot as' }),
	oneSidedOutside: count.meta({ description: 'Of those, the ones that gainsay the stated band' }),
	enteredLater: count.meta({
		description: 'Held against an assessment that was entered after the day of the reading'
	})
});
export type ErrorFigures = z.infer<typeof errorFiguresSchema>;

const daysFiguresSchema = z.object({
	installations: count.meta({ description: 'That somebody has looked at or reported of' }),
	lookedAt: count.meta({ description: 'Of those, the ones that somebody has looked at' }),
	observedYears: z.number(),
	statedDays: z.number().meta({ description: 'Cut-out days to be expected in the time observed' }),
	reportedDays: count,
	statedDaysAYear: z.number().nullable().meta({ description: 'Null where there are too few to tell' }),
	reportedDaysAYear: z.number().nullable(),
	ratio: ratioSchema.nullable().meta({ description: 'Reported by stated, with its exact 95 % interval' })
});
export type DaysFigures = z.infer<typeof daysFiguresSchema>;

/** What figures are told apart by. */
export const GROUPINGS = ['book', 'zone', 'position'] as const;
export type Grouping = (typeof GROUPINGS)[number];

const groups = <S extends z.ZodObject>(figures: S) => {
	const rows = z.array(z.object({ key: z.string(), name: z.string(), figures }));
	return z.object({ book: rows, zone: rows, position: rows });
};

/** Installations whose stated chance of going dark at least once in the time observed lies between two shares. */
export const chanceBinSchema = z.object({
	from: z.number(),
	to: z.number(),
	installations: count,
	statedShare: z
		.number()
		.nullable()
		.meta({ description: 'Mean of the stated chances; null where it is empty' }),
	wentDark: count,
	observedShare: interval
		.extend({ value: z.number() })
		.nullable()
		.meta({ description: 'With its exact 95 % interval; null where there are too few to tell' })
});
export type ChanceBin = z.infer<typeof chanceBinSchema>;

export const accuracySchema = z.object({
	fewest: count.meta({ description: 'With fewer, a group says that it is too few to tell' }),
	temperatures: z.array(
		z.object({
			kind: z.enum(TEMPERATURE_KINDS),
			all: errorFiguresSchema,
			by: groups(errorFiguresSchema),
			steps: z.array(z.object({ fromK: z.number(), toK: z.number(), readings: count })).meta({
				description: 'How many errors lie in each step of two kelvin; the ends hold what lies beyond'
			})
		})
	),
	cutOuts: z
		.object({
			all: daysFiguresSchema,
			lookedAt: daysFiguresSchema.meta({ description: 'The same of those that somebody has looked at' }),
			by: groups(daysFiguresSchema),
			chances: z.array(chanceBinSchema)
		})
		.nullable(),
	capacity: z
		.object({
			all: errorFiguresSchema,
			by: groups(errorFiguresSchema),
			waiting: count.meta({ description: 'Tests whose assessment has no outlook to be held against' })
		})
		.nullable(),
	leftOut: z.array(
		z.object({
			kind: z.enum(READING_KINDS),
			why: z.enum(LEFT_OUT),
			readings: count,
			inside: count.meta({ description: 'Of those, the ones inside the stated band' })
		})
	),
	waitingTraces: count.meta({
		description: 'Measured traces that are being held against what had been predicted of them'
	}),
	unheldTraces: count.meta({
		description: 'Measured traces that no prediction could be held against'
	})
});
export type Accuracy = z.infer<typeof accuracySchema>;

export const readingsQuerySchema = z.object({
	kind: z.enum(READING_KINDS).optional().meta({ label: 'Kind of reading' }),
	book: z.coerce
		.number()
		.int()
		.positive()
		.max(1e9)
		.optional()
		.meta({ label: 'Book', description: 'Number of a book' }),
	zone: z
		.string()
		.regex(/^(none|[A-Z][A-Za-z]{1,2})$/, { error: 'There is no such zone.' })
		.optional()
		.meta({ description: 'A climate class, or "none"' }),
	position: z.enum(POSITION_KINDS, { error: 'There is no such kind of position.' }).optional(),
	show: z
		.enum(['counted', 'left-out'])
		.default('counted')
		.meta({ description: 'What counts, or what was left out' }),
	cursor: z.string().max(400).optional().meta({ description: 'Where the page before ended' }),
	limit: z.coerce.number().int().min(1).max(200).default(25)
});
export type ReadingsQuery = z.infer<typeof readingsQuerySchema>;

/** One measurement beside what was predicted of it: kelvin and °C, shares of the capacity, or days, by kind. */
export const readingSchema = z.object({
	id: z.number().int(),
	kind: z.enum(READING_KINDS),
	readOn: z.iso.date().meta({ description: 'Of cut-outs: the last day of which anything is known' }),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	mountId: z.number().int(),
	mount: z.string(),
	assessmentId: z.number().int(),
	book: z.number().int().meta({ description: 'Number of the book that the assessment was made with' }),
	zone: z.string(),
	position: z.enum(POSITION_KINDS),
	measured: z.number().nullable().meta({ description: 'Null where a label says a side only' }),
	label: z
		.object({ place: z.string(), turnedC: z.number().nullable(), notTurnedC: z.number().nullable() })
		.nullable(),
	trace: z
		.object({ id: z.number().int(), name: z.string(), place: z.string() })
		.nullable()
		.meta({ description: 'Of traces: measured and predicted are means over the trace, at its place' }),
	predicted: z.number(),
	low: z.number(),
	high: z.number(),
	error: z.number().nullable(),
	deviations: z.number().meta({ description: 'The error in stated standard deviations' }),
	stand: z.enum(STANDS),
	chance: z.number().nullable().meta({ description: 'Of cut-outs: the stated chance of one at least' }),
	observedDays: z.number().int().nullable(),
	isEnteredLater: z.boolean(),
	leftOut: z.enum(LEFT_OUT).nullable()
});
export type Reading = z.infer<typeof readingSchema>;

export const readingsSchema = z.object({
	readings: z.array(readingSchema),
	total: count,
	next: z.string().nullable()
});
export type Readings = z.infer<typeof readingsSchema>;

/** What a measured trace says beside what had been predicted of its day. */
export type TraceHold =
	| { state: 'waits'; share: number }
	| { state: 'held'; reading: Reading }
	| { state: 'none'; why: 'no-assessment' | 'no-hour' | 'no-run' };

/** How many traces are still to be held, and how far that is, 0 to 1. */
export interface HoldsProgress {
	waiting: number;
	share: number;
}
