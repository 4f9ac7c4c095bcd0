import { z } from 'zod';
import { optionalWords, versionSchema, words } from './fields';
import {
	NOTE_CHARS,
	PRE_DRILL_ANSWERS,
	sayMissingNote,
	SIGNER_CHARS,
	type PreDrillAnswers,
	type PreDrillWord
} from './pre-drill';
import { PRE_DRILL_KEYS, preDrillLabelOf } from './pre-drill-questions';

/** The box beside an answer. */
export const noteName = (key: string): string => `${key}Note`;

const fields = Object.fromEntries(
	PRE_DRILL_KEYS.flatMap((key) => [
		[key, z.enum(['', ...PRE_DRILL_ANSWERS]).default('')],
		[noteName(key), optionalWords(`${preDrillLabelOf(key)}: the note`, NOTE_CHARS)]
	])
);

/** All questions as one form has them: a choice and a note each; what is not asked stays empty. The name is for signing. */
export const preDrillFormSchema = z
	.object({ ...fields, signerName: optionalWords('Your name', SIGNER_CHARS), version: versionSchema })
	.superRefine((form, context) => {
		const given = form as Record<string, unknown>;
		for (const key of PRE_DRILL_KEYS) {
			const message = sayMissingNote(
				key,
				given[key] as PreDrillWord | '',
				String(given[noteName(key)] ?? '')
			);
			if (message) context.addIssue({ code: 'custom', path: [noteName(key)], message });
		}
	});

/** The same form sent to be signed: then it takes a name. */
export const preDrillSigningSchema = preDrillFormSchema.safeExtend({
	signerName: words('Your name', SIGNER_CHARS)
});

export const toPreDrillForm = (answers: PreDrillAnswers): Record<string, string> =>
	Object.fromEntries(
		Object.entries(answers).flatMap(([key, given]) =>
			given ? [[key, given.answer] as const, [noteName(key), given.note] as const] : []
		)
	);

/** The answers that were given; a question without one is left out. */
export function fromPreDrillForm(form: Readonly<Record<string, unknown>>): PreDrillAnswers {
	return Object.fromEntries(
		PRE_DRILL_KEYS.filter((key) => form[key] !== '').map((key) => [
			key,
			{ answer: form[key] as PreDrillWord, note: String(form[noteName(key)] ?? '') }
		])
	);
}
