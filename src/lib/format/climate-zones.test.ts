import { describe, expect, it } from 'vitest';
import { CLIMATE_ZONES } from '../schemas/places';
import { formatClimateZone, sayClimateZone } from './climate-zones';

describe('climate classes in plain words', () => {
	it('has different words for each of the thirty', () => {
		const words = CLIMATE_ZONES.map(sayClimateZone);
		expect(new Set(words).size).toBe(30);
		expect(words.filter((word) => (CLIMATE_ZONES as readonly string[]).includes(word))).toEqual([]);
	});

	it('says the words first and the class after them', () => {
		expect(formatClimateZone('BWh')).toBe('Hot desert (BWh)');
	});

	it('says what it does not know as it stands', () => {
		expect(formatClimateZone('Xx')).toBe('Xx');
	});
});
