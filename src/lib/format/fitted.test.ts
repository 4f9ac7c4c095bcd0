import { describe, expect, it } from 'vitest';
import { NOT_PROPOSED } from '../schemas/fitting';
import { sayFitted, sayTooEarly } from './fitted';

const SHIELD = { key: 'shield', label: 'Shield', agreed: 'None' };
const CABLE = { key: 'cable', label: 'Cable', agreed: NOT_PROPOSED };
const FUSE = { key: 'fuse', label: 'Fuse', agreed: NOT_PROPOSED };

describe('what was fitted, in a sentence', () => {
	it('is as agreed only where something was agreed', () => {
		expect(sayFitted([SHIELD], [])).toBe('Fitted as agreed.');
		expect(sayFitted([SHIELD, CABLE, FUSE], [])).toBe(
			'Fitted as agreed. Not proposed and not noted: cable and fuse.'
		);
	});

	it('counts what is otherwise, and leaves out what was noted', () => {
		const fuse = { key: 'fuse' as const, fitted: '60 A' };
		expect(sayFitted([SHIELD, CABLE, FUSE], [fuse])).toBe(
			'One thing is not as agreed. Not proposed and not noted: cable.'
		);
	});
});

describe('a day of fitting', () => {
	const at = '2026-03-04T10:00:00.000Z';

	it('before the recommendation is questioned', () => {
		expect(sayTooEarly('2026-03-02', at)).toContain('before it was recommended, on 4 March 2026');
	});

	it.each(['2026-03-03', '2026-03-04', '2026-06-01'])(
		'that may be the same day somewhere, or later, is not: %s',
		(day) => {
			expect(sayTooEarly(day, at)).toBe('');
		}
	);
});
