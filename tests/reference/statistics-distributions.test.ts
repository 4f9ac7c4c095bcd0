import { describe, expect, it } from 'vitest';
import {
	distributionQuantile,
	normalCdf,
	normalQuantile,
	sampleQuantile,
	type Distribution
} from '../../src/lib/thermal/statistics';
import { checkAgainst, type PublishedValue } from './support/check-against';

describe('distributions', () => {
	const worked: Omit<PublishedValue, 'name' | 'expected'> = {
		source: 'Evans, Hastings and Peacock, Statistical Distributions, 3rd ed.',
		place: 'inverse distribution functions, worked with SciPy',
		standing: 'worked from the published equation',
		unit: '',
		tolerance: { relative: 1e-12 },
		because: 'both use the same equation'
	};
	const CASES: [string, Distribution, number, number][] = [
		['uniform 2 to 5', { kind: 'uniform', low: 2, high: 5 }, 0.25, 2.75],
		['triangular 0, 1, 4', { kind: 'triangular', low: 0, mode: 1, high: 4 }, 0.1, Math.sqrt(0.4)],
		['triangular 0, 1, 4', { kind: 'triangular', low: 0, mode: 1, high: 4 }, 0.9, 4 - Math.sqrt(1.2)],
		['normal 20, 3', { kind: 'normal', mean: 20, sd: 3 }, 0.975, 25.879891953620163],
		[
			'lognormal 8, 0.5',
			{ kind: 'lognormal', median: 8, logSd: 0.5 },
			0.8413447460685429,
			13.189770165601024
		],
		[
			'truncated normal 10, 2, 9 to 20',
			{ kind: 'truncated normal', mean: 10, sd: 2, low: 9, high: 20 },
			0.5,
			10.793741572775788
		],
		[
			'truncated normal 0, 1, 8 to 9',
			{ kind: 'truncated normal', mean: 0, sd: 1, low: 8, high: 9 },
			0.25,
			8.035339621905017
		]
	];
	for (const [name, distribution, share, expected] of CASES) {
		checkAgainst({ ...worked, name: `${name}, quantile ${share}`, expected }, () =>
			distributionQuantile(distribution, share)
		);
	}

	it.each(CASES)('%s never falls as the share grows', (_, distribution) => {
		const values = Array.from({ length: 99 }, (_share, k) =>
			distributionQuantile(distribution, (k + 1) / 100)
		);
		expect([...values].sort((a, b) => a - b)).toEqual(values);
	});

	it('reach their ends', () => {
		const ends = (distribution: Distribution) =>
			[0, 1].map((share) => distributionQuantile(distribution, share));
		expect(ends({ kind: 'uniform', low: -1, high: 2 })).toEqual([-1, 2]);
		expect(ends({ kind: 'triangular', low: -1, mode: 2, high: 2 })).toEqual([-1, 2]);
		expect(ends({ kind: 'truncated normal', mean: 0, sd: 1, low: -1, high: 2 })).toEqual([-1, 2]);
	});

	it('mirror: a tail cut on the left is one cut on the right', () => {
		const left = { kind: 'truncated normal', mean: 0, sd: 1, low: -12, high: -10 } as const;
		const right = { kind: 'truncated normal', mean: 0, sd: 1, low: 10, high: 12 } as const;
		for (const share of [0.125, 0.5, 0.875]) {
			expect(distributionQuantile(left, share)).toBe(-distributionQuantile(right, 1 - share));
		}
	});

	it('a cut so wide that it cuts nothing is the whole normal distribution', () => {
		const cut = { kind: 'truncated normal', mean: 3, sd: 2, low: -100, high: 100 } as const;
		expect(distributionQuantile(cut, 0.3)).toBeCloseTo(3 + 2 * normalQuantile(0.3), 12);
		expect(normalCdf((distributionQuantile(cut, 0.7) - 3) / 2)).toBeCloseTo(0.7, 12);
	});

	it('are refused when they are none', () => {
		const refuse = (distribution: Distribution, share = 0.5) =>
			expect(() => distributionQuantile(distribution, share));
		refuse({ kind: 'uniform', low: 2, high: 2 }).toThrow('low is 2: it must be finite and below 2.');
		refuse({ kind: 'triangular', low: 0, mode: 3, high: 2 }).toThrow('mode is 3: it must be within 0 to 2.');
		refuse({ kind: 'normal', mean: 0, sd: 0 }).toThrow('sd is 0');
		refuse({ kind: 'normal', mean: NaN, sd: 1 }).toThrow('mean is NaN');
		refuse({ kind: 'normal', mean: 0, sd: 1 }, 0).toThrow('p is 0');
		refuse({ kind: 'lognormal', median: -1, logSd: 1 }).toThrow('median is -1');
		refuse({ kind: 'truncated normal', mean: 0, sd: 1, low: 38, high: 40 }).toThrow('lowInSd is 38');
		refuse({ kind: 'uniform', low: 0, high: 1 }, 1.1).toThrow('share is 1.1');
	});
});

describe('quantiles of a sample', () => {
	const SAMPLE = [9, 1, 5, 3, 10, 2, 7, 4, 8, 6];
	const EXPECTED: [number, number][] = [
		[0, 1],
		[0.1, 1.9],
		[0.25, 3.25],
		[0.5, 5.5],
		[0.9, 9.1],
		[1, 10]
	];
	for (const [p, expected] of EXPECTED) {
		checkAgainst(
			{
				name: `quantile ${p} of the numbers 1 to 10`,
				source: 'Hyndman and Fan, The American Statistician 50 (1996) 361',
				place: 'definition 7: 1 + 9p',
				standing: 'worked from the published equation',
				expected,
				unit: '',
				tolerance: { absolute: 1e-14 },
				because: 'rounding of one product'
			},
			() => sampleQuantile(SAMPLE, p)
		);
	}

	it('leave the sample as it was', () => {
		const sample = [3, 1, 2];
		sampleQuantile(sample, 0.5);
		expect(sample).toEqual([3, 1, 2]);
		expect(sampleQuantile([42], 0.7)).toBe(42);
	});

	it('are refused for an empty sample, a hole in it, a share beyond 1', () => {
		expect(() => sampleQuantile([], 0.5)).toThrow('values.length is 0');
		expect(() => sampleQuantile([1, NaN], 0.5)).toThrow('values is NaN');
		expect(() => sampleQuantile([1], 1.5)).toThrow('p is 1.5');
	});
});
