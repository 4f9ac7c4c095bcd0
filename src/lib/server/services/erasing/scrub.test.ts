import { describe, expect, it } from 'vitest';
import { makeScrubber } from './scrub';

const { text, free, json } = makeScrubber(
	['Ida Fell', 'ida@travellers.example', '+61 8 5550', 'Ida Fell-Oster'],
	['Ida Fell']
);

describe('taking a person out of a text', () => {
	it('finds names, addresses and numbers, whatever their case, and nothing inside another word', () => {
		expect(text('For IDA FELL, ida@travellers.example, +61 8 5550.')).toBe(
			'For (erased), (erased), (erased).'
		);
		expect(text('Idaho, fallen, Ida Fellow')).toBe('Idaho, fallen, Ida Fellow');
	});

	it('takes the longest first, so that nothing is left of a longer name', () => {
		expect(text('Ida Fell-Oster')).toBe('(erased)');
	});

	it('finds parts of a name as they are written, where people write freely', () => {
		expect(free('Ms Fell wants what fell off; Ida agrees')).toBe(
			'Ms (erased) wants what fell off; (erased) agrees'
		);
		expect(text('Ms Fell wants it')).toBe('Ms Fell wants it');
	});

	it('goes through a value and leaves numbers and names of fields alone', () => {
		const value = { 'Ida Fell': 1, list: ['Ida Fell', null, { deep: 'by Ida Fell' }] };
		expect(json(value)).toEqual({ 'Ida Fell': 1, list: ['(erased)', null, { deep: 'by (erased)' }] });
	});

	it('changes nothing where nothing is known', () => {
		const none = makeScrubber(['', ' '], []);
		expect(none.free('Ida Fell')).toBe('Ida Fell');
	});
});
