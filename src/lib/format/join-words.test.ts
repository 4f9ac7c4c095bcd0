import { describe, expect, it } from 'vitest';
import { joinWords } from './join-words';

describe('words in a row', () => {
	it.each([
		[[], ''],
		[['A'], 'A'],
		[['A', 'B'], 'A and B'],
		[['A', 'B', 'C'], 'A, B and C']
	])('%j are "%s"', (words, joined) => {
		expect(joinWords(words)).toBe(joined);
	});

	it('may be a choice', () => {
		expect(joinWords(['°C', '°F', 'K'], 'or')).toBe('°C, °F or K');
	});
});
