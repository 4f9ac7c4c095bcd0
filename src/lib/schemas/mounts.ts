import { z } from 'zod';
import { cableInputSchema } from './cables';
import { versionSchema, words } from './fields';
import { positionKindSchema, surveyAnswersSchema } from './survey';

export const MAX_MOUNTS = 6;

export const mountInputSchema = z.object({
	name: words('What you call this position', 80),
	positionKind: positionKindSchema
});
export type MountInput = z.infer<typeof mountInputSchema>;

/** The survey as it stands; `complete` once the last question was passed. */
export const mountSurveySchema = z.object({
	survey: surveyAnswersSchema,
	complete: z.boolean(),
	version: versionSchema
});
export type MountSurvey = z.infer<typeof mountSurveySchema>;

export const mountSchema = mountInputSchema.extend({
	id: z.number().int(),
	jobId: z.number().int(),
	letter: z.string(),
	survey: surveyAnswersSchema,
	surveyComplete: z.boolean(),
	cable: cableInputSchema.nullable(),
	version: versionSchema
});
export type MountView = z.infer<typeof mountSchema>;
