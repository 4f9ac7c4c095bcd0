import { z } from 'zod';
import { optionalWords, versionSchema, words } from './fields';
import { PRE_DRILL_KEYS, preDrillLabelOf, type PreDrillQuestion } from './pre-drill-questions';

/** It holds, it does not, or it does not arise here (which takes a word why). */
export const PRE_DRILL_ANSWERS = ['holds', 'does-not', 'not-here'] as const;
export type PreDrillWord = (typeof PRE_DRILL_ANSWERS)[number];

export const PRE_DRILL_LABELS: Readonly<Record<PreDrillWord, string>> = {
	holds: 'Yes',
	'does-not': 'No',
	'not-here': 'Does not arise'
};

export const NOTE_CHARS = 160;

const preDrillAnswerSchema = z.object({
	answer: z.enum(PRE_DRILL_ANSWERS, { error: 'Answer yes, no or does not arise.' }),
	note: optionalWords('Note', NOTE_CHARS)
});
export type PreDrillAnswer = z.infer<typeof preDrillAnswerSchema>;

/** What is missing beside the answer to a question; null when nothing is. Only a plain yes stands without a word. */
export function sayMissingNote(key: string, answer: PreDrillWord | '', note: string): string | null {
	if (answer === '' || answer === 'holds' || note !== '') return null;
	const what = answer === 'does-not' ? 'say what is missing.' : 'say why it does not arise here.';
	return `${preDrillLabelOf(key)}: ${what}`;
}

/** The answers so far, by question. */
export const preDrillAnswersSchema = z
	.partialRecord(z.enum(PRE_DRILL_KEYS), preDrillAnswerSchema)
	.superRefine((answers, context) => {
		for (const [key, given] of Object.entries(answers)) {
			const message = given ? sayMissingNote(key, given.answer, given.note) : null;
			if (message) context.addIssue({ code: 'custom', path: [key, 'note'], message });
		}
	});
export type PreDrillAnswers = z.infer<typeof preDrillAnswersSchema>;

/** As they are kept: with the maker's words that an answer was given to. */
export type KeptAnswers = Record<string, (PreDrillAnswer & { quote?: string }) | undefined>;

export const keepQuotes = (questions: readonly PreDrillQuestion[], answers: PreDrillAnswers): KeptAnswers =>
	Object.fromEntries(
		Object.entries(answers).map(([key, given]) => {
			const quote = questions.find((question) => question.key === key)?.quote ?? null;
			return [key, given && quote !== null ? { ...given, quote } : given];
		})
	);

/** The answer to a question; one that was given to other words of the maker is none. */
export function answerTo({ key, quote }: PreDrillQuestion, answers: KeptAnswers): PreDrillAnswer | null {
	const given = answers[key];
	return given && (quote === null || given.quote === quote) ? given : null;
}

/** A question as it was put: another one has another key, or is about other words of the maker. */
export type AskedThen = Pick<PreDrillQuestion, 'key' | 'quote'>;

export const listAsked = (questions: readonly PreDrillQuestion[]): AskedThen[] =>
	questions.map(({ key, quote }) => ({ key, quote }));

export const preDrillChangeSchema = z.object({ answers: preDrillAnswersSchema, version: versionSchema });
export type PreDrillChange = z.infer<typeof preDrillChangeSchema>;

export const SIGNER_CHARS = 120;

/** A name under the answers as they stand. */
export const preDrillSignatureSchema = z.object({
	name: words('Your name', SIGNER_CHARS),
	version: versionSchema
});
export type PreDrillSignature = z.infer<typeof preDrillSignatureSchema>;

/** What stands open before drilling, as it is printed. */
export const openItemSchema = z.object({
	key: z.string(),
	label: z.string(),
	state: z.enum(['unanswered', 'failed']),
	note: z.string()
});
export type OpenItem = z.infer<typeof openItemSchema>;

export const preDrillSchema = z.object({
	mountId: z.number().int(),
	questions: z.array(
		z.object({
			key: z.string(),
			label: z.string(),
			question: z.string(),
			reason: z.string(),
			photo: z.boolean(),
			quote: z.string().nullable().meta({ description: 'Words of the maker that it is about' }),
			beside: z
				.array(z.object({ label: z.string(), value: z.string() }))
				.meta({ description: 'What the survey says that bears on it' }),
			answer: z.enum(PRE_DRILL_ANSWERS).nullable(),
			note: z.string()
		})
	),
	open: z.array(openItemSchema),
	signedBy: z.string().nullable(),
	signedAt: z.iso.datetime().nullable(),
	signedBefore: z
		.object({ by: z.string(), at: z.iso.datetime() })
		.nullable()
		.meta({ description: 'A name from before something else was asked: it does not count any more' }),
	version: versionSchema
});
export type PreDrillView = z.infer<typeof preDrillSchema>;

/** What a recommendation says of the check as it stood. */
export const preDrillSnapshotSchema = preDrillSchema.pick({ open: true, signedBy: true, signedAt: true });
export type PreDrillSnapshot = z.infer<typeof preDrillSnapshotSchema>;

/** The questions that have no answer, and those whose answer is no. */
export function findOpenItems(questions: readonly PreDrillQuestion[], answers: KeptAnswers): OpenItem[] {
	return questions.flatMap((question): OpenItem[] => {
		const { key, label } = question;
		const given = answerTo(question, answers);
		if (!given) return [{ key, label, state: 'unanswered', note: '' }];
		return given.answer === 'does-not' ? [{ key, label, state: 'failed', note: given.note }] : [];
	});
}
