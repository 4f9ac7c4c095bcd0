import { z } from 'zod';
import { idSchema, words } from './fields';
import { VERDICTS } from './verdicts';

export const RERUN_OCCASIONS = ['in-force', 'withdrawn'] as const;
export type RerunOccasion = (typeof RERUN_OCCASIONS)[number];
export const RERUN_STATES = ['running', 'cancelled', 'done'] as const;
export type RerunState = (typeof RERUN_STATES)[number];
export const RERUN_ITEM_STATES = ['waiting', 'done', 'passed-over', 'failed'] as const;
export type RerunItemState = (typeof RERUN_ITEM_STATES)[number];
export const TOLD_HOW = ['letter', 'otherwise'] as const;
export type ToldHow = (typeof TOLD_HOW)[number];

/**
 * So many days like the assessed one are drawn for each mount: enough to tell one day of twenty from three, and few enough for
 * a workshop of 10,000. The full outlook draws 512, when somebody looks.
 */
export const DAYS_DRAWN = 32;

const count = z.number().int().min(0);

/** How far a re-run is. */
export const rerunProgressSchema = z.object({
	state: z.enum(RERUN_STATES),
	total: count,
	waiting: count,
	done: count,
	passedOver: count.meta({ description: 'Assessed anew or removed meanwhile' }),
	failed: count,
	changed: count.meta({ description: 'With another verdict than before' }),
	untold: count.meta({ description: 'Of those changed: nobody has been told of it yet' })
});
export type RerunProgress = z.infer<typeof rerunProgressSchema>;

export const rerunSchema = rerunProgressSchema.extend({
	id: z.number().int(),
	bookId: z.number().int(),
	bookNumber: z.number().int(),
	bookName: z.string(),
	occasion: z
		.enum(RERUN_OCCASIONS)
		.meta({ description: 'What the book did: came into force, or was withdrawn' }),
	begunBy: z.string(),
	createdAt: z.iso.datetime(),
	endedAt: z.iso.datetime().nullable()
});
export type RerunView = z.infer<typeof rerunSchema>;

const outcome = z.object({
	assessmentId: z.number().int(),
	verdict: z.enum(VERDICTS),
	headroomK: z.number(),
	peakCellsC: z.number()
});

/** A verdict that changed, and who should know. */
export const rerunChangeSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	customerName: z.string(),
	mountLetter: z.string(),
	mountName: z.string(),
	chemistry: z.string(),
	before: outcome,
	after: outcome,
	cutOutShare: z
		.number()
		.nullable()
		.meta({ description: 'Of days like the assessed one, drawn around the new assessment' }),
	isFitted: z.boolean(),
	wasSent: z.boolean().meta({ description: 'The customer holds a page that says what was said before' }),
	assessedBy: z.string(),
	recipient: z.string().meta({ description: 'The customer’s e-mail; empty where none is known' }),
	draft: z.object({ subject: z.string(), body: z.string() }),
	toldAt: z.iso.datetime().nullable(),
	toldBy: z.string(),
	toldHow: z.enum(TOLD_HOW).nullable()
});
export type RerunChange = z.infer<typeof rerunChangeSchema>;

/** One that was not assessed again, and why. */
export const rerunLeftSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	mountLetter: z.string(),
	state: z.enum(RERUN_ITEM_STATES),
	reason: z.string()
});
export type RerunLeft = z.infer<typeof rerunLeftSchema>;

export const rerunMoveSchema = z.object({
	to: z.enum(['running', 'cancelled'], { error: 'Say whether it is to go on or to stop.' })
});
export type RerunMove = z.infer<typeof rerunMoveSchema>;

/** The letter as it is written on the page. */
export const verdictLetterSchema = z.object({ subject: words('Subject', 150), body: words('Letter', 4000) });

/** How somebody was told of a changed verdict: by this letter, or otherwise, which is noted alone. */
export const tellSchema = z.discriminatedUnion('how', [
	verdictLetterSchema.extend({ how: z.literal('letter') }),
	z.object({ how: z.literal('otherwise') })
]);
export type Tell = z.infer<typeof tellSchema>;

/** Which page of the changed verdicts. */
export const changesQuerySchema = z.object({
	page: z.coerce.number({ error: 'There is no such page.' }).int().min(1).max(10_000).default(1)
});

export const rerunItemParams = z.object({ rerunId: idSchema, itemId: idSchema });
