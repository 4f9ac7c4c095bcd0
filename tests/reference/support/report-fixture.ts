import { expect, it } from 'vitest';
import { checkAgainst, type PublishedValue } from './check-against';

/** What the report is tried on: a check that is met, two that are not, and tests that hold no published value. */
const PUBLISHED: PublishedValue = {
	name: 'a third',
	source: 'Arithmetic for the report',
	place: 'page 1',
	standing: 'common practice',
	expected: 1 / 3,
	unit: 'm',
	tolerance: { absolute: 0.001 },
	because: 'printed to three digits'
};

checkAgainst(PUBLISHED, () => 0.3333);
checkAgainst({ ...PUBLISHED, name: 'a half for a third' }, () => 0.5);
checkAgainst({ ...PUBLISHED, name: 'a third that throws' }, () => {
	throw new Error('no thirds today');
});
checkAgainst({ ...PUBLISHED, name: 'a third that is no number' }, () => NaN);
it('holds no published value', () => expect(1 + 1).toBe(2));
it('holds none and fails', () => expect(1 + 1).toBe(3));
