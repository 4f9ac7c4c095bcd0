import { describe, expect, it } from 'vitest';
import { formatFitted, readLegNumbers, sayLearnt } from './fits';

const plain = (text: string): string => text.replace(/\u202f/g, ' ');

describe('a fitted figure', () => {
	it('has four digits that mean something', () => {
		expect([0.74987, 27.0312, 3.2, 0.00123456, -1.5].map((value) => formatFitted(value))).toEqual([
			...['0.7499', '27.03', '3.2', '0.001235', '−1.5']
		]);
		expect(plain(formatFitted(210_312.7, 'J/K'))).toBe('210,300 J/K');
		expect(formatFitted(0)).toBe('0');
		expect(formatFitted(120)).toBe('120');
	});

	it('says how much was learnt of it', () => {
		expect(plain(sayLearnt(0.312))).toBe('31 % of the spread is left');
		expect(sayLearnt(0.995)).toBe('nothing was learnt');
	});
});

describe('legs that are kept back', () => {
	it('are named by their numbers', () => {
		expect(readLegNumbers('2, 4;5  2')).toEqual([2, 4, 5]);
		expect(readLegNumbers(' ')).toEqual([]);
		expect(readLegNumbers('2, last')).toBeNull();
	});
});
