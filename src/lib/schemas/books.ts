import { z } from 'zod';
import { POSITION_KINDS, type PositionKind } from '../thermal/survey';
import { idSchema, optionalWords, versionSchema, words } from './fields';
import { ENGINE_LAYOUTS, type EngineLayout } from './vehicles';

export const BOOK_STATES = ['draft', 'on-trial', 'in-force', 'withdrawn'] as const;
export type BookState = (typeof BOOK_STATES)[number];

/** Engine layouts that a book can be for: not the unknown one, of which there is nothing to know. */
export const BOOK_LAYOUTS = ['any', ...ENGINE_LAYOUTS.filter((layout) => layout !== 'unknown')] as const;
export const BOOK_POSITIONS = ['any', ...POSITION_KINDS] as const;

/** What a book holds for: "any" where it does not matter. */
const scopeFields = {
	engineLayout: z.enum(BOOK_LAYOUTS, { error: 'Say which engine layout it is for, or any.' }),
	positionKind: z.enum(BOOK_POSITIONS, { error: 'Say which kind of position it is for, or any.' })
};
export type BookScope = z.infer<z.ZodObject<typeof scopeFields>>;

/** What a mount is, as far as a book is chosen by it. */
export interface MountCase {
	engineLayout: EngineLayout;
	positionKind: PositionKind;
}

export const isGeneral = ({ engineLayout, positionKind }: BookScope): boolean =>
	engineLayout === 'any' && positionKind === 'any';

export const holdsFor = ({ engineLayout, positionKind }: BookScope, mount: MountCase): boolean =>
	(engineLayout === 'any' || engineLayout === mount.engineLayout) &&
	(positionKind === 'any' || positionKind === mount.positionKind);

/** The place decides more than the engine: a book for both comes first, then one for the place, then one for the engine. */
const closeness = ({ engineLayout, positionKind }: BookScope): number =>
	(positionKind === 'any' ? 0 : 2) + (engineLayout === 'any' ? 0 : 1);

/** Of books in force the one that a mount is assessed with: the closest that holds for it. */
export function closestBook<B extends BookScope>(books: readonly B[], mount: MountCase): B | undefined {
	return books
		.filter((book) => holdsFor(book, mount))
		.sort((left, right) => closeness(right) - closeness(left))[0];
}

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
	source: z.string(),
	fitId: z.number().int().nullable().meta({ description: 'The fit that the value came from' })
});
export type CoefficientView = z.infer<typeof coefficientSchema>;

export const bookRowSchema = z.object({
	id: z.number().int(),
	number: z.number().int(),
	name: z.string(),
	state: z.enum(BOOK_STATES),
	note: z.string(),
	...scopeFields,
	madeBy: z.string().meta({ description: 'Empty for the first book, which nobody made' }),
	madeById: z.number().int().nullable().meta({ description: 'Whoever made a book does not put it in force' }),
	inForceBy: z.string(),
	inForceAt: z.iso.datetime().nullable(),
	createdAt: z.iso.datetime(),
	version: versionSchema
});
export type BookRow = z.infer<typeof bookRowSchema>;

/** Values of one book that cannot be true together. */
export const contradictionSchema = z.object({
	paths: z.array(z.string()).meta({ description: 'The coefficients that it is between' }),
	value: z.number(),
	limit: z.string(),
	message: z.string()
});
export type ContradictionView = z.infer<typeof contradictionSchema>;

export const bookSchema = bookRowSchema.extend({
	coefficients: z.array(coefficientSchema),
	contradictions: z
		.array(contradictionSchema)
		.meta({ description: 'With one of them a book goes neither on trial nor into force' })
});
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
	engineLayout: scopeFields.engineLayout.default('any').meta({ label: 'For engines' }),
	positionKind: scopeFields.positionKind.default('any').meta({ label: 'For positions' }),
	...bookWords
});
/** As it is asked for: without a word of what it is for, it is for everything. */
export type BookDraft = Pick<z.output<typeof bookDraftSchema>, 'fromBookId' | 'name' | 'note'> &
	Partial<BookScope>;

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
