import { describe, expect, it } from 'vitest';
import { NO_ZONE } from '../schemas/review';
import { NO_NAMES, sayConditions, type ReviewConditions, type ScopeNames } from './review-conditions';

const say = (conditions: Omit<ReviewConditions, 'kind'>, names: Partial<ScopeNames> = {}, kind = 'climate') =>
	sayConditions({ kind: kind as ReviewConditions['kind'], ...conditions }, { ...NO_NAMES, ...names });

describe('what the review is narrowed to, in words', () => {
	it('is nothing where all of it is shown', () => {
		expect(say({})).toBeNull();
		expect(say({}, {}, 'own')).toBeNull();
	});

	it.each([
		[{ since: '2026-01' }, 'Only installations fitted since Jan 2026.'],
		[{ until: '2026-03' }, 'Only installations fitted until Mar 2026.'],
		[{ since: '2026-01', until: '2026-03' }, 'Only installations fitted from Jan 2026 to Mar 2026.'],
		[{ since: '2026-03', until: '2026-03' }, 'Only installations fitted in Mar 2026.'],
		[{ verdict: 'cuts-out' as const }, 'Only installations that cut out or get too hot.'],
		[{ list: 'missing' as const }, 'Only installations without a sheet.']
	])('says %j', (conditions, words) => {
		expect(say(conditions)).toBe(words);
	});

	it('says all that is asked for at once', () => {
		const asked = { verdict: 'runs-close', since: '2026-01', zone: 'BWh', list: 'overdue' } as const;
		expect(say(asked, { zoneName: 'Hot desert (BWh)', placeName: 'Alice Springs' })).toBe(
			'Only installations fitted since Jan 2026, that run close, of the zone Hot desert (BWh), of the place Alice Springs, with an overdue follow-up.'
		);
	});

	it('has words for what is in no zone', () => {
		expect(say({ zone: NO_ZONE }, { zoneName: 'No place was given' })).toBe(
			'Only installations whose job has no place.'
		);
		expect(say({ zone: NO_ZONE }, {}, 'own')).toBe('Only installations in none of your zones.');
	});
});
