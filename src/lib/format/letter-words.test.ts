import { describe, expect, it } from 'vitest';
import type { SentLetter } from '../schemas/letters';
import { sayLetterState } from './letter-words';

const AT = '2026-03-04T12:00:00.000Z';
const letter = (changes: Partial<SentLetter>): SentLetter => ({
	...{ id: 1, kind: 'reminder', about: 'Reminder of a follow-up', recipient: 'a@b.example', subject: 'Time' },
	...{ state: 'waiting', attempts: 0, createdAt: AT, sentAt: null, nextTryAt: AT, lastError: '' },
	...{ canTryAgain: false, mayHaveArrived: false, ...changes }
});

describe('what became of a letter', () => {
	it.each<[Partial<SentLetter>, RegExp]>([
		[{}, /^Waiting to be sent$/],
		[{ attempts: 1 }, /^Waiting, tried once, again at 4 March 2026/],
		[{ attempts: 3 }, /^Waiting, tried 3 times/],
		[{ state: 'sent', attempts: 1, sentAt: AT, nextTryAt: null }, /^Sent 4 March 2026/],
		[{ state: 'failed', attempts: 8, canTryAgain: true }, /^Given up, tried 8 times$/],
		[{ state: 'unsure', attempts: 1, canTryAgain: true }, /^It may have arrived$/],
		[{ state: 'failed', attempts: 0 }, /^Not sent any more$/]
	])('%j is said plainly', (changes, words) => {
		expect(sayLetterState(letter(changes))).toMatch(words);
	});
});
