import { describe, expect, it } from 'vitest';
import { parseAsked, type AuditAsked } from './audit-query';

const refusals = (asked: AuditAsked) => {
	const parsed = parseAsked(asked);
	return 'problems' in parsed ? parsed.problems : [];
};

describe('what is asked of the trail', () => {
	it('may begin and end on the same day, or have one end alone', () => {
		expect(refusals({ from: '2026-03-04', to: '2026-03-04' })).toEqual([]);
		expect(refusals({ from: '2026-03-04' })).toEqual([]);
		expect(refusals({ to: '2026-03-04' })).toEqual([]);
	});

	it.each<[AuditAsked, string, string]>([
		[{ from: '2026-03-04', to: '2026-03-03' }, 'to', 'To must be 2026-03-04 or later, as From is.'],
		[{ from: 'spring' }, 'from', 'From must be a day, such as 2026-03-04.'],
		[{ to: '2026-02-30' }, 'to', 'To must be a day, such as 2026-03-04.'],
		[{ words: 'x'.repeat(81) }, 'words', 'Search for 80 characters or fewer.'],
		[{ person: 'somebody' }, 'person', 'Choose somebody from the list.']
	])('is refused at its box: %o', (asked, path, message) => {
		expect(refusals(asked)).toEqual([{ path, message }]);
	});
});
