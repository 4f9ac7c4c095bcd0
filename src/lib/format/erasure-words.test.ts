import { describe, expect, it } from 'vitest';
import { sayWaiting } from './erasure-words';

const OLDEST_AT = '2026-03-04T12:00:00.000Z';

describe('requests for deletion that wait', () => {
	it.each([
		[0, ''],
		[1, 'One request waits, since 4 March 2026'],
		[2, '2 requests wait, the oldest since 4 March 2026']
	])('%i of them', (count, words) => {
		expect(sayWaiting({ count, oldestAt: count === 0 ? null : OLDEST_AT })).toBe(words);
	});
});
