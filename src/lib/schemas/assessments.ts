import { z } from 'zod';
import type { DoneAssessment } from '../thermal/assess';
import type { Derivation } from '../thermal/survey';
import type { ScenarioInput } from '../thermal/types';
import type { TouringYear } from '../thermal/uncertainty/cut-out-days';
import { assessmentResultSchema } from './assessment-result';
import { batteryInputSchema, CHEMISTRIES } from './batteries';
import { cableInputSchema } from './cables';
import { dayPlanInputSchema } from './day-plans';
import { idSchema } from './fields';
import { hotDayFields, placeSiteSchema } from './places';
import { surveyAnswersSchema } from './survey';
import { vehicleInputSchema } from './vehicles';
import { VERDICTS } from './verdicts';

/** What the engine answered, whole. */
export type AssessmentResult = DoneAssessment;

const derivationSchema = z.object({
	path: z.string().meta({ description: 'Where it went in the scenario' }),
	label: z.string(),
	value: z.union([z.number(), z.string()]),
	unit: z.string(),
	basis: z.string().meta({ description: 'The formula with its numbers, and where it comes from' })
}) satisfies z.ZodType<Derivation>;

const oneYear = <S extends z.ZodType>(month: S) => z.array(month).length(12);

/** The weather of a year and the days on the road in it, January to December. */
export const touringSchema = z.object({
	months: oneYear(z.object({ meanMaxC: z.number(), spreadK: z.number() })),
	daysOnRoad: oneYear(z.number().int()),
	basis: z.string().meta({ description: 'Where the months come from, in words' })
}) satisfies z.ZodType<TouringYear>;
export type Touring = z.infer<typeof touringSchema>;

/** Everything that went into an assessment, as it was at that moment. */
export const assessmentInputsSchema = z.object({
	jobNumber: z.number().int(),
	customerName: z.string(),
	vehicle: vehicleInputSchema,
	battery: batteryInputSchema,
	mount: z.object({ letter: z.string(), name: z.string(), survey: surveyAnswersSchema }),
	dayPlan: dayPlanInputSchema,
	place: placeSiteSchema,
	/** The cable and fuse that were proposed for the mount; absent where nobody had said. */
	cable: cableInputSchema.optional(),
	/** The hot day that was planned for: the place's own figures unless the job changed them. */
	hotDay: z.object(hotDayFields),
	touring: touringSchema.optional().meta({ description: 'Not in assessments from before it was kept' }),
	book: z.object({
		number: z.number().int(),
		name: z.string(),
		coefficients: z.record(z.string(), z.record(z.string(), z.number()))
	}),
	/** What the engine was given. */
	scenario: z.custom<ScenarioInput>().meta({ type: 'object' }),
	derivations: z.array(derivationSchema),
	/** One plain sentence for each thing that nobody measured. */
	assumptions: z.array(z.string())
});
export type AssessmentInputs = z.infer<typeof assessmentInputsSchema>;

export const assessRequestSchema = z.object({ mountId: idSchema });

export const assessmentRowSchema = z.object({
	id: z.number().int(),
	jobId: z.number().int(),
	mountId: z.number().int(),
	mountLetter: z.string(),
	mountName: z.string(),
	/** Of the battery as it was then. */
	chemistry: z.enum(CHEMISTRIES),
	verdict: z.enum(VERDICTS),
	headroomK: z.number(),
	peakCellsC: z.number(),
	peakAtHour: z.number(),
	cutAtHour: z.number().nullable(),
	resetAtHour: z.number().nullable(),
	darkHours: z.number(),
	chargeMissedAh: z.number(),
	engineVersion: z.string(),
	bookNumber: z.number().int(),
	createdAt: z.iso.datetime()
});
export type AssessmentRow = z.infer<typeof assessmentRowSchema>;

/** A mount that stands in a job, with its newest assessment or none. */
export const mountOutcomeSchema = z.object({
	mountId: z.number().int(),
	letter: z.string(),
	name: z.string(),
	surveyComplete: z.boolean(),
	assessment: assessmentRowSchema.nullable()
});
export type MountOutcome = z.infer<typeof mountOutcomeSchema>;

export const assessmentSchema = assessmentRowSchema.extend({
	bookId: z.number().int(),
	assessedBy: z.string(),
	inputs: assessmentInputsSchema,
	inputsSha256: z.string().meta({ description: 'Of the inputs as JSON with sorted keys' }),
	result: assessmentResultSchema,
	isCurrent: z.boolean().meta({
		description: 'The job, the book and the engine are still those that it was made with'
	}),
	cautions: z.array(z.string()).meta({ description: 'Names of the cautions that it carries' })
});
export type AssessmentView = z.infer<typeof assessmentSchema>;

/** What making an assessment again from its stored inputs gave. */
export const reproductionSchema = z.object({
	same: z.boolean().meta({ description: 'Every digit of the result is the same' }),
	inputsIntact: z.boolean().meta({ description: 'The stored inputs still have their hash' }),
	engineThen: z.string(),
	engineNow: z.string()
});
export type Reproduction = z.infer<typeof reproductionSchema>;
