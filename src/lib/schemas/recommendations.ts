import { z } from 'zod';
import { assessmentRowSchema, type AssessmentView, type MountOutcome } from './assessments';
import { isExcludedAt } from './batteries';
import { idSchema, words } from './fields';
import { cautionLineSchema } from './caution-texts';
import { preDrillSnapshotSchema } from './pre-drill';
import type { LogoView, WorkshopHead } from './shop';

/** Less is no name and no reason: both are kept for good, and the customer reads them. */
export const FEWEST_CHARACTERS = { decidedBy: 3, reason: 10 } as const;

/** What goes against something: either takes a named person and a written reason. */
export interface Against {
	againstVerdict: boolean;
	againstMaker: boolean;
}

export const findAgainst = ({ verdict, inputs }: Pick<AssessmentView, 'verdict' | 'inputs'>): Against => ({
	againstVerdict: verdict === 'cuts-out',
	againstMaker: isExcludedAt(inputs.battery, inputs.mount.survey.positionKind)
});

/** Going ahead against "cuts out" or the maker's word takes a named person and a written reason; otherwise neither is asked for. */
export const recommendationInputSchema = z.object({
	assessmentId: idSchema,
	decidedBy: words('Who decided', 120).optional(),
	reason: words('Reason', 1_000).optional()
});
export type RecommendationInput = z.infer<typeof recommendationInputSchema>;

export const recommendationSchema = z.object({
	id: z.number().int(),
	number: z.number().int().meta({ description: 'Which one of its job' }),
	jobId: z.number().int(),
	jobNumber: z.number().int(),
	assessment: assessmentRowSchema,
	againstVerdict: z.boolean(),
	againstMaker: z.boolean().meta({
		description: 'The maker does not allow it there; false too where nobody was asked yet who answers for it'
	}),
	decidedBy: z.string().nullable(),
	reason: z.string().nullable(),
	madeOutTo: z.string().meta({ description: 'The customer as they were called when it was made' }),
	customerNow: z
		.string()
		.nullable()
		.meta({ description: 'What they are called now, where that is another name' }),
	/** The check before drilling as it stood; null for those that were made before there was one. */
	preDrill: preDrillSnapshotSchema.nullable(),
	/** As they read when it was issued; null for those from before they were kept. */
	cautions: z.array(cautionLineSchema).nullable(),
	recommendedBy: z.string(),
	createdAt: z.iso.datetime(),
	replacedBy: z
		.object({
			id: z.number().int(),
			number: z.number().int(),
			recommendedBy: z.string(),
			createdAt: z.iso.datetime()
		})
		.nullable()
		.meta({ description: 'The next recommendation of the same mount' }),
	isFittedUnder: z.boolean().meta({ description: 'Whether what was fitted is held against this one' })
});
export type RecommendationView = z.infer<typeof recommendationSchema>;

/** Made against the maker's word before anybody was asked who answers for that. */
export const isUndecided = (
	{ decidedBy }: Pick<RecommendationView, 'decidedBy'>,
	assessment: Pick<AssessmentView, 'verdict' | 'inputs'>
): boolean => decidedBy === null && findAgainst(assessment).againstMaker;

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
