import { z } from 'zod';

export const BOOK_STATES = ['draft', 'on-trial', 'in-force', 'withdrawn'] as const;
export type BookState = (typeof BOOK_STATES)[number];

export const coefficientSchema = z.object({
	group: z.string(),
	key: z.string(),
	value: z.number(),
	unit: z.string(),
	meaning: z.string(),
	/** The thermal model's own value; null where it has none. */
	default: z.number().nullable(),
	source: z.string()
});
export type CoefficientView = z.infer<typeof coefficientSchema>;

export const bookRowSchema = z.object({
	id: z.number().int(),
	number: z.number().int(),
	name: z.string(),
	state: z.enum(BOOK_STATES),
	note: z.string(),
	createdAt: z.iso.datetime()
});
export type BookRow = z.infer<typeof bookRowSchema>;

export const bookSchema = bookRowSchema.extend({ coefficients: z.array(coefficientSchema) });
export type BookView = z.infer<typeof bookSchema>;
