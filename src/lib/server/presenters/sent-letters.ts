import { LETTER_KINDS, type LetterKind, type SentLetter } from '$lib/schemas/letters';
import type { OutgoingMail } from '../db/models';

/** A letter of the sending log. What it says is not shown: it may hold a link that opens something. */
export function presentSentLetter(letter: OutgoingMail): SentLetter {
	const { id, kind, recipient, subject, state, attempts, lastError, textBody } = letter;
	return {
		...{ id, kind, recipient, subject, state, attempts, lastError },
		about: LETTER_KINDS[kind as LetterKind] ?? 'Letter',
		createdAt: letter.createdAt.toISOString(),
		sentAt: letter.sentAt?.toISOString() ?? null,
		nextTryAt: state === 'waiting' ? letter.nextAttemptAt.toISOString() : null,
		canTryAgain: (state === 'failed' || state === 'unsure') && textBody !== '',
		mayHaveArrived: state === 'unsure'
	};
}
