import { z } from 'zod';

/** Unit names that people may write and that stand beside a box; SI is what is stored. */
export type MeasureUnit =
	| 'mm'
	| 'm'
	| 'kg'
	| 'm²'
	| 'mm²'
	| '°C'
	| 'K'
	| 'A'
	| 'Ah'
	| 'V'
	| 'mΩ'
	| 's'
	| 'min'
	| 'km/h'
	| '%'
	| 'W/m²'
	| '°'
	| 'h'
	| 'years';

export interface FieldMeta {
	label: string;
	unit?: MeasureUnit;
	hint?: string;
}

/** A number with its label, unit and hard limits: one definition serves the form, the API and the database. */
export function measure(label: string, unit: MeasureUnit, min: number, max: number, hint?: string) {
	return z
		.number({ error: `${label} must be a number.` })
		.min(min, { error: `${label} must be at least ${min} ${unit}.` })
		.max(max, { error: `${label} must be at most ${max} ${unit}.` })
		.meta({ label, unit, ...(hint ? { hint } : {}) });
}

/** A whole number without a unit. */
export function wholeNumber(label: string, min: number, max: number) {
	return z
		.number({ error: `${label} must be a number.` })
		.int({ error: `${label} must be a whole number from ${min} to ${max}.` })
		.min(min, { error: `${label} must be at least ${min}.` })
		.max(max, { error: `${label} must be at most ${max}.` })
		.meta({ label });
}

/** Text that must be there. */
export function words(label: string, max: number) {
	return z
		.string({ error: `${label} is missing.` })
		.trim()
		.min(1, { error: `${label} is missing.` })
		.max(max, { error: `${label} must be ${max} characters or fewer.` })
		.meta({ label });
}

/** Text that may be empty. */
export function optionalWords(label: string, max: number) {
	return z
		.string()
		.trim()
		.max(max, { error: `${label} must be ${max} characters or fewer.` })
		.default('')
		.meta({ label });
}

const EMAIL_WORDS = 'must look like name@example.org.';
const EMAIL_CHARS = 254;
const EMAIL_TOO_LONG = `must be ${EMAIL_CHARS} characters or fewer.`;

export function email(label: string) {
	return z
		.string()
		.trim()
		.toLowerCase()
		.max(EMAIL_CHARS, { error: `${label} ${EMAIL_TOO_LONG}` })
		.pipe(z.email({ error: `${label} ${EMAIL_WORDS}` }))
		.meta({ label });
}

/** An address, or nothing. */
export function optionalEmail(label: string) {
	return z
		.string()
		.trim()
		.toLowerCase()
		.max(EMAIL_CHARS, { error: `${label} ${EMAIL_TOO_LONG}` })
		.default('')
		.refine((value) => value === '' || z.email().safeParse(value).success, {
			error: `${label} ${EMAIL_WORDS}`
		})
		.meta({ label });
}

/** Digits and what people put between them, dashes of every kind too, then perhaps an extension; the first of them is a digit but for signs. */
const PHONE = /^(?=[\s+()./\p{Pd}]*\d)[\d\s+()./\p{Pd}]+((ext\.?|extension|x)\s*\d+)?$/iu;
const PHONE_CHARS = 40;
const PHONE_WORDS = 'takes only digits, spaces, + ( ) - . / and an extension such as "ext 12" at its end.';

/** A telephone number as people write it, or nothing. */
export function optionalPhone(label: string) {
	return optionalWords(label, PHONE_CHARS)
		.refine((value) => value === '' || PHONE.test(value), { error: `${label} ${PHONE_WORDS}` })
		.meta({ label });
}

export const idSchema = z.coerce
	.number({ error: 'The number of the record is missing.' })
	.int()
	.positive()
	.max(Number.MAX_SAFE_INTEGER);

/** The version that the person saw: a save against an older one is refused. */
export const versionSchema = z.coerce.number().int().min(0);

/** What identifies a record that people edit. */
export const editedSchema = z.object({ id: idSchema, version: versionSchema });
