import { describe, expect, it } from 'vitest';
import { sayReminded } from './reminder-words';

describe('who is reminded', () => {
	it.each([
		['customer', 'goes to the customer by e-mail'],
		['workshop', 'goes to the workshop by e-mail'],
		['stopped', 'has stopped reminders: none goes out'],
		['erased', 'is erased: no reminder goes out'],
		['nobody', 'No reminder goes out']
	] as const)('%s: %s', (reminded, words) => {
		expect(sayReminded(reminded, true)).toContain(words);
		expect(sayReminded(reminded, false)).toBe('Every look is done: no reminder goes out.');
	});
});
