import { z } from 'zod';
import { MAIL_STATES } from './sheets';

/** What letters are about, in the words of the shop's sending log. */
export const LETTER_KINDS = {
	sheet: 'The customer’s page',
	question: 'A question of the customer',
	answer: 'An answer to the customer',
	'verdict-changed': 'A verdict that changed',
	reminder: 'Reminder of a follow-up',
	'erasure-asked': 'A customer asks for deletion',
	'erasure-withdrawn': 'A customer takes back a request for deletion',
	'erasure-refused': 'A request for deletion, refused',
	'erasure-granted': 'A request for deletion, done',
	'sign-in': 'Link to sign in',
	invitation: 'Invitation to the workshop',
	'second-factor': 'A second factor that was reset'
} as const;
export type LetterKind = keyof typeof LETTER_KINDS;

/** One line of the sending log; what a letter says is not kept. */
export const sentLetterSchema = z.object({
	id: z.number().int(),
	kind: z.string().meta({ description: `One of ${Object.keys(LETTER_KINDS).join(', ')}` }),
	about: z.string(),
	recipient: z.string(),
	subject: z.string(),
	state: z.enum(MAIL_STATES).meta({ description: 'failed: given up; unsure: it may have arrived' }),
	attempts: z.number().int(),
	createdAt: z.iso.datetime(),
	sentAt: z.iso.datetime().nullable(),
	nextTryAt: z.iso.datetime().nullable(),
	lastError: z.string(),
	canTryAgain: z.boolean(),
	mayHaveArrived: z.boolean()
});
export type SentLetter = z.infer<typeof sentLetterSchema>;
