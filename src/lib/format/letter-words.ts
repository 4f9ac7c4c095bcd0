import { formatDateTime } from './dates';
import type { SentLetter } from '../schemas/letters';

const sayTries = (attempts: number): string => (attempts === 1 ? 'tried once' : `tried ${attempts} times`);

/** What became of a letter, in a few words. */
export function sayLetterState({ state, attempts, sentAt, nextTryAt, canTryAgain }: SentLetter): string {
	if (state === 'sent') return sentAt ? `Sent ${formatDateTime(sentAt)}` : 'Sent';
	if (state === 'failed') return canTryAgain ? `Given up, ${sayTries(attempts)}` : 'Not sent any more';
	if (state === 'unsure') return 'It may have arrived';
	if (attempts === 0) return 'Waiting to be sent';
	return `Waiting, ${sayTries(attempts)}${nextTryAt ? `, again at ${formatDateTime(nextTryAt)}` : ''}`;
}
