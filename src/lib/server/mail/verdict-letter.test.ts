import { describe, expect, it } from 'vitest';
import { draftVerdictLetter } from './verdict-letter';

const ABOUT = {
	...({
		customerName: 'Ada',
		vehicle: 'a wagon',
		mountName: 'by the wall',
		chemistry: 'lithium-iron-phosphate'
	} as const),
	...{ isFitted: true, workshop: { name: 'The shop', phone: '', email: '' }, by: 'Bo' }
};
const draft = (before: 'rides-it-out' | 'cuts-out', after: 'rides-it-out' | 'runs-close') =>
	draftVerdictLetter({ ...ABOUT, before, after }).body;

describe('the draft of a letter about another verdict', () => {
	it('asks for a talk where it got worse', () => {
		expect(draft('rides-it-out', 'runs-close')).toContain('Please talk to us before your next hot trip');
	});

	it('gives no all-clear: better is not good yet while it runs close, and what was advised stays', () => {
		const close = draft('cuts-out', 'runs-close');
		expect(close).toContain('still close');
		expect(close).toContain('What we advised stays as it was');
		expect(draft('cuts-out', 'rides-it-out')).toContain('What we advised for hot days stays as it was');
		for (const body of [close, draft('cuts-out', 'rides-it-out')])
			expect(body).toContain('not a certificate');
	});
});
