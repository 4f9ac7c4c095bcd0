import { z } from 'zod';
import { FITTED_GROUPS, type DoneCoefficientFit } from '../thermal/fit';
import { idSchema, optionalWords, words } from './fields';

export const FIT_STATES = ['running', 'done', 'failed', 'cancelled'] as const;
export type FitState = (typeof FIT_STATES)[number];
export const PRIOR_LAWS = ['lognormal', 'logit-normal', 'normal'] as const;
export const FIT_LOSSES = ['soft-l1', 'huber', 'squares'] as const;

export const MOST_FIT_NAME = 80;
export const MOST_FIT_TRACES = 12;
export const MOST_FIT_COEFFICIENTS = 12;

const priorSchema = z.object({
	law: z.enum(PRIOR_LAWS).meta({ label: 'Law' }),
	middle: z.number({ error: 'Middle must be a number.' }).meta({ label: 'Middle' }),
	spread: z
		.number({ error: 'Spread must be a number.' })
		.positive({ error: 'Spread must be above 0.' })
		.meta({
			label: 'Spread',
			description: 'One standard deviation: of the value, of its logarithm, or of its logit'
		})
});

const fitCoefficientSchema = z.object({
	group: z.enum(FITTED_GROUPS),
	key: z.string().max(60),
	prior: priorSchema
});

const fitTraceSchema = z.object({
	traceId: idSchema,
	heldOutLegs: z
		.array(z.number().int().min(1), {
			error: 'Legs that are kept back are whole numbers with commas between, such as 2, 4.'
		})
		.max(200)
		.default([])
		.meta({ description: 'Counted from 1: kept back to test the fit with' })
});

/** What somebody asks to be fitted, to which traces. */
export const fitInputSchema = z.object({
	name: words('Name', MOST_FIT_NAME),
	traces: z
		.array(fitTraceSchema)
		.min(1, { error: 'Choose at least one trace.' })
		.max(MOST_FIT_TRACES, { error: `At most ${MOST_FIT_TRACES} traces are fitted together.` }),
	coefficients: z
		.array(fitCoefficientSchema)
		.min(1, { error: 'Choose at least one coefficient.' })
		.max(MOST_FIT_COEFFICIENTS, {
			error: `At most ${MOST_FIT_COEFFICIENTS} coefficients are fitted together.`
		}),
	loss: z.enum(FIT_LOSSES).default('soft-l1'),
	leaveOut: z.boolean().default(true).meta({ description: 'Whether to fit without each trace in turn' })
});
export type FitInput = z.infer<typeof fitInputSchema>;

/** What went in, as it was then: a trace that is changed later makes another fit. */
export interface FitInputs extends Omit<FitInput, 'name' | 'traces'> {
	traces: (FitInput['traces'][number] & { assessmentId: number; sha256: string; version: number })[];
	bookNumber: number;
}

export const fitRowSchema = z.object({
	id: z.number().int(),
	name: z.string(),
	state: z.enum(FIT_STATES),
	isSynthetic: z.boolean().meta({ description: 'Any of its traces was made up' }),
	traceCount: z.number().int(),
	coefficientCount: z.number().int(),
	madeBy: z.string(),
	createdAt: z.iso.datetime(),
	finishedAt: z.iso.datetime().nullable(),
	engineVersion: z.string()
});
export type FitRow = z.infer<typeof fitRowSchema>;

export const fitSchema = fitRowSchema.extend({
	traces: z.array(
		z.object({
			id: z.number().int(),
			name: z.string().meta({ description: 'Empty where it is gone' }),
			isSynthetic: z.boolean(),
			mount: z
				.object({
					jobNumber: z.number().int(),
					letter: z.string(),
					name: z.string(),
					vehicle: z.string()
				})
				.nullable()
				.meta({ description: 'Where it was measured; null where the trace is gone' }),
			day: z
				.string()
				.meta({ description: 'When it was measured, by its own clock; empty where the file does not say' }),
			heldOutLegs: z.array(z.number().int())
		})
	),
	coefficients: z.array(
		fitCoefficientSchema.extend({ group: z.string(), meaning: z.string(), unit: z.string() })
	),
	loss: z.enum(FIT_LOSSES),
	leaveOut: z.boolean(),
	bookId: z.number().int(),
	bookNumber: z.number().int(),
	failure: z.string(),
	result: z.custom<DoneCoefficientFit>().nullable().meta({ type: 'object' })
});
export type FitView = z.infer<typeof fitSchema>;

/** A coefficient that can be fitted, with what is held of it before. */
export interface FitChoice {
	group: string;
	key: string;
	meaning: string;
	unit: string;
	prior: z.infer<typeof priorSchema>;
	basis: string;
}

/** A draft book with the values of a fit. */
export const fittedDraftSchema = z.object({
	name: words('Name', 80),
	note: optionalWords('What it is for', 500)
});
export type FittedDraft = z.infer<typeof fittedDraftSchema>;
