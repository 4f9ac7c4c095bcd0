import { describe, expect, it } from 'vitest';
import type { SheetStatus } from '$lib/schemas/sheets';
import { listSheetFacts, sayLetter, saySending, saySheetState } from './sheet-words';

const AT = '2026-03-04T12:00:00.000Z';
const status = (changes: Partial<SheetStatus> = {}): SheetStatus => ({
	...{ id: 1, recommendationId: 2, mountName: 'Rear corner', verdict: 'runs-close' },
	...{ chemistry: 'lithium-iron-phosphate', sentTo: 'a@b.example' },
	...{ sentBy: 'Noor', createdAt: AT, mail: 'waiting', mailAttempts: 0, mailError: '', mailSentAt: null },
	...{ linkFirstOpenedAt: null, withdrawnAt: null, acknowledgedAt: null, acknowledgedBy: null },
	...changes
});
const SENT = { mail: 'sent', mailSentAt: AT } as const;
const OPENED = { ...SENT, linkFirstOpenedAt: AT } as const;
const ACKNOWLEDGED = { ...OPENED, acknowledgedAt: AT, acknowledgedBy: 'Ilse Tarn' } as const;

describe('what became of a sheet', () => {
	it.each([
		[{}, 'On its way'],
		[SENT, 'Sent, not opened'],
		[{ mail: 'failed' } as const, 'Letter not sent'],
		[{ mail: 'unsure' } as const, 'May have arrived: ask'],
		[{ ...OPENED, mail: 'unsure' } as const, 'Opened, not acknowledged'],
		[OPENED, 'Opened, not acknowledged'],
		[ACKNOWLEDGED, 'Acknowledged'],
		[{ ...OPENED, withdrawnAt: AT }, 'Withdrawn'],
		[{ ...ACKNOWLEDGED, withdrawnAt: AT }, 'Acknowledged, then withdrawn']
	])('%j is said as "%s"', (changes, words) => {
		expect(saySheetState(status(changes))).toBe(words);
	});

	it('says to whom it went, and that this is erased where it is', () => {
		expect(saySending(status())).toMatch(/^To a@b\.example by Noor, 4 March 2026, /);
		expect(saySending(status({ sentTo: '' }))).toMatch(/^To \(erased\) by Noor, /);
	});

	it('says of the letter whether it waits, waits again, went or failed', () => {
		expect(sayLetter(status())).toBe('waiting to be sent');
		const failing = { mailAttempts: 2, mailError: 'The mail server cannot be reached.' };
		expect(sayLetter(status(failing))).toBe('waiting for its next try');
		expect(sayLetter(status({ mail: 'failed' }))).toBe('not sent');
		expect(sayLetter(status({ mail: 'unsure' }))).toBe('may have arrived');
		expect(sayLetter(status(SENT))).toContain('sent 4 March 2026');
	});

	it('gives the reason for a letter that did not go, in the mail server’s words', () => {
		const mailError = 'The mail server answered: 550 No such mailbox';
		expect(listSheetFacts(status({ mail: 'failed', mailError }))[0]).toMatchObject({ note: mailError });
	});

	it('warns that an opened link is not yet a reader, until somebody acknowledged', () => {
		const noteOf = (changes: Partial<SheetStatus>) => listSheetFacts(status(changes))[1]!.note;
		expect(noteOf(OPENED)).toContain('only the acknowledgement is a person');
		expect(noteOf(ACKNOWLEDGED)).toBeUndefined();
	});
});
