import { z } from 'zod';
import { assessmentRowSchema, type AssessmentView, type MountOutcome } from './assessments';
import { idSchema, words } from './fields';
import { cautionLineSchema } from './caution-texts';
import { preDrillSnapshotSchema } from './pre-drill';
import type { LogoView, WorkshopHead } from './shop';

/** Less is no name and no reason: both are kept for good, and the customer reads them. */
export const FEWEST_CHARACTERS = { decidedBy: 3, reason: 10 } as const;

/** Going ahead against "cuts out" takes a named person and a written reason; otherwise neither is asked for. */
export const recommendationInputSchema = z.object({
	assessmentId: idSchema,
	decidedBy: words('Who decided', 120).optional(),
	reason: words('Reason', 1_000).optional()
});
export type RecommendationInput = z.infer<typeof recommendationInputSchema>;

export const recommendationSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	assessment: assessmentRowSchema,
	againstVerdict: z.boolean(),
	decidedBy: z.string().nullable(),
	reason: z.string().nullable(),
	/** The check before drilling as it stood; null for those that were made before there was one. */
	preDrill: preDrillSnapshotSchema.nullable(),
	/** As they read when it was issued; null for those from before they were kept. */
	cautions: z.array(cautionLineSchema).nullable(),
	recommendedBy: z.string(),
	createdAt: z.iso.datetime(),
	replacedBy: z
		.object({ id: z.number().int(), recommendedBy: z.string(), createdAt: z.iso.datetime() })
		.nullable()
		.meta({ description: 'The next recommendation of the same mount' }),
	isFittedUnder: z.boolean().meta({ description: 'Whether what was fitted is held against this one' })
});
export type RecommendationView = z.infer<typeof recommendationSchema>;

/** Everything that the printed recommendation says. */
export interface RecommendationDocument {
	recommendation: RecommendationView;
	assessment: AssessmentView;
	workshop: WorkshopHead;
	logo: LogoView | null;
	customer: { phone: string; email: string };
	/** The mounts that were not chosen, as they stood when the recommendation was made. */
	others: MountOutcome[];
}
