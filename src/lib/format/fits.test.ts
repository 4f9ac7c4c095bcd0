import { describe, expect, it } from 'vitest';
import { formatFitted, nameFit, readLegNumbers, sayLearnt, sayLegOf, sayMisfit, sayNoBook } from './fits';

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

describe('a fit that is to be doubted', () => {
	it('says what the model does not follow, and by how many times the noise', () => {
		const misfit = { trace: 0, channel: 'cellC', residualK: 3.24, noiseK: 0.5 } as const;
		expect(plain(sayMisfit(misfit, 'ridge.csv'))).toBe(
			'The model does not follow ridge.csv: cells off by 3.2 K (by the middle of its readings), 6 times what the readings stray by (0.5 K).'
		);
		expect(plain(sayMisfit({ ...misfit, measure: 'rms' }, 'ridge.csv'))).toContain(
			'cells off by 3.2 K (root mean square of all its readings), 6 times'
		);
	});

	it('says why no book is made from it, unless it came to a best fit', () => {
		expect(sayNoBook({ stopped: 'converged' })).toBe('');
		for (const stopped of ['stalled', 'evaluations used up'] as const)
			expect(sayNoBook({ stopped })).toContain('no coefficient book is made from it');
	});
});

describe('legs that are kept back', () => {
	it('are named by their numbers', () => {
		expect(readLegNumbers('2, 4;5  2')).toEqual([2, 4, 5]);
		expect(readLegNumbers(' ')).toEqual([]);
		expect(readLegNumbers('2, last')).toBeNull();
	});

	it('are told from the others by when they were and what was done', () => {
		const leg = { startS: 3600, endS: 12_600, kind: 'driving', meanSpeedKmh: 80, why: '' } as const;
		const clock = { timeBase: 'elapsed', timeZone: null, startS: 0 } as const;
		expect(plain(sayLegOf(leg, 1, { ...clock, startHour: 8 }))).toBe(
			'2: 09:00, driving at 80 km/h for 2 h 30 min'
		);
		const stopped = { ...leg, kind: 'stopped', meanSpeedKmh: null } as const;
		expect(plain(sayLegOf(stopped, 0, { ...clock, startHour: null }))).toBe('1: stopped for 2 h 30 min');
	});

	it('says of a dated trace when it was by the clock of its zone', () => {
		// 27 November 2025, 20:30 UTC: in Darwin, 9 h 30 min ahead, it is 06:00 of the next day.
		const startS = Date.UTC(2025, 10, 27, 20, 30) / 1000;
		const clock = { timeBase: 'utc', timeZone: 'Australia/Darwin', startS, startHour: 6 } as const;
		const first = { startS, endS: startS + 9000, kind: 'stopped', meanSpeedKmh: null, why: '' } as const;
		expect(plain(sayLegOf(first, 0, clock))).toBe('1: 28 Nov 2025, 06:00, stopped for 2 h 30 min');
		const second = { ...first, startS: startS + 9000, endS: startS + 12_600 };
		expect(plain(sayLegOf(second, 1, clock))).toBe('2: 28 Nov 2025, 08:30, stopped for 1 h');
	});

	it('says of a trace that knows the time of day alone when it was, once', () => {
		const clock = { timeBase: 'time-of-day', timeZone: null, startS: 21_600, startHour: 6 } as const;
		const first = { startS: 21_600, endS: 25_200, kind: 'stopped', meanSpeedKmh: null, why: '' } as const;
		expect(plain(sayLegOf(first, 0, clock))).toBe('1: 06:00, stopped for 1 h');
	});
});

describe('the name of a fit', () => {
	it('has as many of its coefficients as there is room for, none of them cut', () => {
		expect(nameFit(['Case to cells', 'Leak'])).toBe('Case to cells, Leak');
		const long = 'A coefficient with a name that takes about half of the room';
		expect(nameFit([long, long, long])).toBe(`${long} and 2 more`);
		expect(nameFit([long + long, long])).toBe('2 coefficients');
	});
});
