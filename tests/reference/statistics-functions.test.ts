import { describe, expect, it } from 'vitest';
import * as statistics from '../../src/lib/thermal/statistics';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { readTable } from './support/reference-data';

const rows = readTable('special-functions/values.csv');
const functions = statistics as unknown as Record<string, (...values: number[]) => number>;

/** What digits each function has to get right: those with logarithms of gamma in them lose some to cancellation. */
const TOLERANCES: Record<string, Pick<PublishedValue, 'tolerance' | 'because'>> = {
	normalQuantile: { tolerance: { relative: 2e-15 }, because: 'the algorithm claims 16 digits' },
	normalCdf: {
		tolerance: { relative: 5e-13 },
		because: 'the exponential of a large number loses the digits that the number has before its point'
	},
	logGamma: {
		tolerance: { absolute: 5e-13 },
		because: "Lanczos' sum has about 15 digits, of values up to 6000"
	},
	upperGamma: { tolerance: { relative: 5e-12 }, because: 'logarithms up to 3000 are subtracted' },
	lowerGamma: { tolerance: { relative: 5e-12 }, because: 'logarithms up to 3000 are subtracted' },
	incompleteBeta: { tolerance: { relative: 5e-12 }, because: 'logarithms up to 9000 are subtracted' }
};

describe('functions of statistics', () => {
	for (const { function: name = '', arguments: text = '', expected } of rows) {
		const values = text.split(' ').map(Number);
		const published: PublishedValue = {
			name: `${name}(${values.join(', ')})`,
			source: 'NIST Digital Library of Mathematical Functions',
			place: '5.2, 7.11, 8.2, 8.17, worked with 50 digits',
			standing: 'worked from the published equation',
			expected: Number(expected),
			unit: '',
			...TOLERANCES[name]!
		};
		checkAgainst(published, () => functions[name]!(...values));
	}
});

describe('quantiles and shares', () => {
	const { betaQuantile, gammaQuantile, incompleteBeta, lowerGamma, normalCdf, normalQuantile } = statistics;
	const SHARES = [1e-9, 0.01, 0.3, 0.5, 0.9, 0.999];

	it.each(SHARES)('undo one another at %f', (share) => {
		expect(normalCdf(normalQuantile(share)) / share).toBeCloseTo(1, 12);
		expect(lowerGamma(3.5, gammaQuantile(3.5, share)) / share).toBeCloseTo(1, 12);
		expect(incompleteBeta(betaQuantile(share, 3.5, 20), 3.5, 20) / share).toBeCloseTo(1, 12);
	});

	it('are symmetric', () => {
		expect(normalQuantile(0.25)).toBe(-normalQuantile(0.75));
		expect(normalQuantile(0.5)).toBe(0);
		expect(normalCdf(1.3) + normalCdf(-1.3)).toBeCloseTo(1, 14);
		expect(incompleteBeta(0.2, 3, 7) + incompleteBeta(0.8, 7, 3)).toBeCloseTo(1, 14);
	});

	it('end where they should', () => {
		expect([normalCdf(-Infinity), normalCdf(Infinity)]).toEqual([0, 1]);
		expect([betaQuantile(0, 2, 2), betaQuantile(1, 2, 2), gammaQuantile(2, 0)]).toEqual([0, 1, 0]);
	});

	it('are refused outside their limits', () => {
		expect(() => normalQuantile(0)).toThrow('p is 0: it must be above 0 and below 1.');
		expect(() => normalQuantile(1)).toThrow('p is 1');
		expect(() => normalCdf(NaN)).toThrow('x is NaN');
		expect(() => gammaQuantile(2, 1)).toThrow('p is 1: it must be at least 0 and below 1.');
		expect(() => lowerGamma(0, 1)).toThrow('a is 0');
		expect(() => incompleteBeta(1.01, 1, 1)).toThrow('x is 1.01');
	});
});
