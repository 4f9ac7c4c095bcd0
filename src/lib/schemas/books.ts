import { z } from 'zod';
import { idSchema, optionalWords, versionSchema, words } from './fields';

export const BOOK_STATES = ['draft', 'on-trial', 'in-force', 'withdrawn'] as const;
export type BookState = (typeof BOOK_STATES)[number];

/** Where a value comes from. */
export const ORIGINS = ['published', 'judgement', 'fitted'] as const;
export type Origin = (typeof ORIGINS)[number];

export const coefficientSchema = z.object({
	group: z.string(),
	key: z.string(),
	value: z.number(),
	unit: z.string(),
	meaning: z.string(),
	/** The thermal model's own value; null where it has none. */
	default: z.number().nullable(),
	origin: z.enum(ORIGINS),
	source: z.string()
});
export type CoefficientView = z.infer<typeof coefficientSchema>;

export const bookRowSchema = z.object({
	id: z.number().int(),
	number: z.number().int(),
	name: z.string(),
	state: z.enum(BOOK_STATES),
	note: z.string(),
	madeBy: z.string().meta({ description: 'Empty for the first book, which nobody made' }),
	madeById: z.number().int().nullable().meta({ description: 'Whoever made a book does not put it in force' }),
	inForceBy: z.string(),
	inForceAt: z.iso.datetime().nullable(),
	createdAt: z.iso.datetime(),
	version: versionSchema
});
export type BookRow = z.infer<typeof bookRowSchema>;

export const bookSchema = bookRowSchema.extend({ coefficients: z.array(coefficientSchema) });
export type BookView = z.infer<typeof bookSchema>;

const bookWords = { name: words('Name', 80), note: optionalWords('What it is for', 500) };

/** A coefficient by its group and key, such as "bay.share"; null for what is none. */
export function readCoefficientPath(path: string): { group: string; key: string } | null {
	const [, group, key] = /^([a-zA-Z0-9]+)\.([a-zA-Z0-9]+)$/.exec(path) ?? [];
	return group && key ? { group, key } : null;
}

export const writeCoefficientPath = ({ group, key }: { group: string; key: string }): string =>
	`${group}.${key}`;

/** A new draft, with the values of a book that is there. */
export const bookDraftSchema = z.object({
	fromBookId: idSchema.meta({ label: 'With the values of' }),
	...bookWords
});
export type BookDraft = z.infer<typeof bookDraftSchema>;

/** What somebody says of a value; what a fit gives comes from the fit alone. */
export const coefficientChangeSchema = z.object({
	value: z.number({ error: 'Value must be a number.' }).meta({ label: 'Value' }),
	origin: z
		.enum(['published', 'judgement'], { error: 'Say where the value comes from.' })
		.meta({ label: 'Comes from' }),
	source: words('Source', 300),
	version: versionSchema
});
export type CoefficientChange = z.infer<typeof coefficientChangeSchema>;

export const bookMoveSchema = z.object({
	to: z.enum(['on-trial', 'in-force', 'withdrawn'], { error: 'Say where the book goes.' }),
	version: versionSchema
});
export type BookMove = z.infer<typeof bookMoveSchema>;

/** One coefficient in two books. */
export const coefficientPairSchema = z.object({
	group: z.string(),
	key: z.string(),
	meaning: z.string(),
	unit: z.string(),
	left: coefficientSchema.nullable(),
	right: coefficientSchema.nullable()
});
export type CoefficientPair = z.infer<typeof coefficientPairSchema>;

export const bookComparisonSchema = z.object({
	left: bookRowSchema,
	right: bookRowSchema,
	/** Those that differ alone. */
	differing: z.array(coefficientPairSchema),
	same: z.number().int()
});
export type BookComparison = z.infer<typeof bookComparisonSchema>;
