import { z } from 'zod';

export const BOOK_STATES = ['draft', 'on-trial', 'in-force', 'withdrawn'] as const;
export type BookState = (typeof BOOK_STATES)[number];

export const coefficientSchema = z.object({
	group: z.string(),
	key: z.string(),
	value: z.number(),
	unit: z.string(),
	meaning: z.string(),
	source: z.string()
});

export const bookSchema = z.object({
	id: z.number().int(),
	number: z.number().int(),
	name: z.string(),
	state: z.enum(BOOK_STATES),
	note: z.string(),
	createdAt: z.iso.datetime(),
	coefficients: z.array(coefficientSchema)
});
export type BookView = z.infer<typeof bookSchema>;
