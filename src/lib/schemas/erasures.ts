import { z } from 'zod';
import { idSchema, optionalWords, versionSchema } from './fields';
import { sentLetterSchema } from './letters';

/** Stands where something of a person stood. */
export const ERASED = '(erased)';

export const ERASURE_STATES = ['asked', 'granted', 'refused', 'withdrawn'] as const;
export type ErasureState = (typeof ERASURE_STATES)[number];

/** A customer asks that what is held about them be deleted. */
export const askErasureSchema = z.object({
	understood: z
		.literal(true, { error: 'Tick the box to say that you want this.' })
		.meta({ label: 'Yes, delete what is held about me' })
});

const reason = optionalWords('Reason', 1_000);
const needsReason = ({ decision, reason: given }: { decision: string; reason: string }): boolean =>
	decision === 'grant' || given !== '';
const NO_REASON = { error: 'Reason is missing: say why it is refused.', path: ['reason'] };

export const decideErasureSchema = z
	.object({
		decision: z.enum(['grant', 'refuse'], { error: 'Say whether it is granted or refused.' }),
		reason,
		version: versionSchema
	})
	.refine(needsReason, NO_REASON);
export type DecideErasure = z.infer<typeof decideErasureSchema>;

/** The same on the page, where several requests may stand; a reason that is missing is the service’s to miss. */
export const erasureFormSchema = z.object({
	erasureId: idSchema,
	decision: z.enum(['grant', 'refuse'], { error: 'Choose what to do.' }).meta({ label: 'What to do' }),
	reason,
	version: versionSchema
});

export const erasureSchema = z.object({
	id: z.number().int(),
	customerId: z.number().int(),
	/** Gone once it was granted. */
	customerName: z.string(),
	state: z.enum(ERASURE_STATES),
	askedAt: z.iso.datetime(),
	decidedAt: z.iso.datetime().nullable(),
	reason: z.string(),
	jobs: z.array(z.number().int()).meta({ description: 'Numbers of the jobs that it is about' }),
	vehicles: z.number().int(),
	letter: sentLetterSchema
		.nullable()
		.meta({ description: 'What tells the customer of the decision; null where there is none' }),
	version: versionSchema
});
export type ErasureView = z.infer<typeof erasureSchema>;

/** A customer’s own request, as they see it. */
export const myErasureSchema = z.object({
	state: z.enum(ERASURE_STATES),
	askedAt: z.iso.datetime(),
	reason: z.string(),
	canWithdraw: z.boolean().meta({ description: 'While it waits, where they asked for it themselves' })
});
export type MyErasure = z.infer<typeof myErasureSchema>;

/** What waits for a decision. */
export interface WaitingErasures {
	count: number;
	/** Null where nothing waits. */
	oldestAt: string | null;
}

export interface WaitingErasure {
	id: number;
	askedAt: string;
	/** The rule of the shop put it there, not the customer. */
	isByRule: boolean;
}
