import { describe, expect, it } from 'vitest';
import { parseForm } from '../format/form-values';
import { ownZoneFormOf } from './own-zone-form';

const BOXES = { name: 'North', position: '1', rule: 'latitude', fromValue: '', toValue: '', places: '' };

/** What is wrong with a form, or what it says of the range. */
function read(changes: Partial<typeof BOXES>) {
	const boxes = { ...BOXES, ...changes };
	const answer = parseForm(ownZoneFormOf(boxes.rule), boxes);
	if ('errors' in answer) return answer.errors.map(({ path, message }) => `${path}: ${message}`);
	return [answer.data.fromValue, answer.data.toValue];
}

describe('the form of a zone', () => {
	it('does not look at a range that the rule has no use for', () => {
		expect(read({ rule: 'places', fromValue: 'about 20', toValue: '400' })).toEqual([null, null]);
	});

	it('says what is really missing where no rule is chosen', () => {
		expect(read({ rule: '', fromValue: 'about 20' })).toEqual([
			'rule: Choose how the zone takes its places.'
		]);
	});

	it.each([
		['hottest-month', 'about 20', 'fromValue: From must be a number from −60 to 50.'],
		['hottest-month', '60', 'fromValue: From must be a number from −60 to 50.'],
		['latitude', 'about 20', 'fromValue: From must be a number from −90 to 90.'],
		['latitude', '-91', 'fromValue: From must be a number from −90 to 90.']
	])('says the limits of the rule %s at "%s"', (rule, fromValue, refusal) => {
		expect(read({ rule, fromValue })).toEqual([refusal]);
	});

	it('takes a range with one end, and asks for one where there is none', () => {
		expect(read({ toValue: '−20,5' })).toEqual([null, -20.5]);
		expect(read({})).toEqual(['fromValue: Give where the range begins, or where it ends.']);
		expect(read({ fromValue: '5', toValue: '5' })).toEqual(['toValue: To below must be above from.']);
	});
});
