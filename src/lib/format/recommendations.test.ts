import { describe, expect, it } from 'vitest';
import { findEntrant, sayDecider, sayReplaced } from './recommendations';

const replacedBy = { id: 3010, number: 9, recommendedBy: 'Odo Marsh', createdAt: '2026-03-04T12:00:00.000Z' };

describe('what is said of an earlier recommendation', () => {
	it.each([
		[{ replacedBy: null, isFittedUnder: true }, ''],
		[{ replacedBy, isFittedUnder: false }, 'Replaced by recommendation 9 on 4 March 2026, by Odo Marsh.'],
		[
			{ replacedBy, isFittedUnder: true },
			'What was fitted is held against this one; later came recommendation 9 on 4 March 2026, by Odo Marsh.'
		]
	])('%j: "%s"', (standing, words) => {
		expect(sayReplaced(standing)).toBe(words);
	});
});

describe('who entered a decision', () => {
	it.each([
		['Ilse Tarn', 'Ilse Tarn', null],
		[' ilse  TARN', 'Ilse Tarn', null],
		['Ilse Tarn', 'Odo Marsh', 'Odo Marsh']
	])('decided by "%s", recommended by "%s": %s', (decidedBy, recommendedBy, entrant) => {
		expect(findEntrant(decidedBy, recommendedBy)).toBe(entrant);
	});

	it('is said where it is somebody else', () => {
		expect(sayDecider({ decidedBy: 'Ilse Tarn', recommendedBy: 'Odo Marsh' })).toBe(
			'Ilse Tarn, entered by Odo Marsh'
		);
		expect(sayDecider({ decidedBy: 'Odo Marsh', recommendedBy: 'Odo Marsh' })).toBe('Odo Marsh');
	});
});
