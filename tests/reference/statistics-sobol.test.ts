import { describe, expect, it } from 'vitest';
import {
	hashWords,
	mixBits,
	scrambledSobolCoordinate,
	scrambledSobolPoint,
	SOBOL_DIMENSIONS,
	sobolCoordinate,
	sobolPoint
} from '../../src/lib/thermal/statistics';
import { checkAgainst, type PublishedValue } from './support/check-against';
import { readTable } from './support/reference-data';

const EXACT = { tolerance: { absolute: 0 }, because: 'binary fractions, which a double holds exactly' };

/** The first ten points in three dimensions. */
const FIRST_POINTS = [
	[0, 0, 0],
	[0.5, 0.5, 0.5],
	[0.75, 0.25, 0.25],
	[0.25, 0.75, 0.75],
	[0.375, 0.375, 0.625],
	[0.875, 0.875, 0.125],
	[0.625, 0.125, 0.875],
	[0.125, 0.625, 0.375],
	[0.1875, 0.3125, 0.9375],
	[0.6875, 0.8125, 0.4375]
];

describe("the beginning of Sobol's sequence", () => {
	FIRST_POINTS.forEach((point, index) =>
		point.forEach((expected, dimension) => {
			const published: PublishedValue = {
				name: `Sobol point ${index}, coordinate ${dimension + 1}`,
				source: 'Joe and Kuo, SIAM J. Sci. Comput. 30 (2008), as in the tests of SALib',
				place: 'first ten points in 3 dimensions',
				standing: 'read in the source',
				expected,
				unit: '',
				...EXACT
			};
			checkAgainst(published, () => sobolCoordinate(index, dimension));
		})
	);
});

describe("Sobol's sequence against another implementation", () => {
	const rows = readTable('sobol-points/points.csv');

	it.each(rows)('has point $index to the last digit', (row) => {
		const { index, ...coordinates } = row;
		for (const [column, expected] of Object.entries(coordinates)) {
			expect(sobolCoordinate(Number(index), Number(column.slice(1)))).toBe(Number(expected));
		}
	});
});

/** How many of the points lie in each of as many equal parts of an axis. */
function countStrata(values: readonly number[]): number[] {
	const counts = values.map(() => 0);
	for (const value of values) counts[Math.floor(value * values.length)]!++;
	return counts;
}

describe('scrambled points', () => {
	const SEEDS = [0, 1, 2, 77, 4_294_967_295];

	it.each(SEEDS)('have one point in each of 256 parts of every axis (seed %i)', (seed) => {
		for (let dimension = 0; dimension < SOBOL_DIMENSIONS; dimension++) {
			const axis = Array.from({ length: 256 }, (_, index) =>
				scrambledSobolCoordinate(index, dimension, seed)
			);
			expect(countStrata(axis).every((count) => count === 1)).toBe(true);
		}
	});

	it('keep the even spread of the first two axes over squares and bands', () => {
		const points = Array.from({ length: 256 }, (_, index) => scrambledSobolPoint(index, 2, 5));
		for (const [columns, rows] of [
			[16, 16],
			[4, 64],
			[128, 2]
		] as const) {
			const cells = points.map(([x = 0, y = 0]) => Math.floor(x * columns) * rows + Math.floor(y * rows));
			expect(new Set(cells).size).toBe(256);
		}
	});

	it.each(readTable('sobol-points/scrambled.csv'))(
		'have the digits that another language gives them: point $index, dimension $dimension, seed $seed',
		({ index, dimension, seed, coordinate }) => {
			expect(scrambledSobolCoordinate(Number(index), Number(dimension), Number(seed))).toBe(
				Number(coordinate)
			);
		}
	);

	it('are others for another seed, and the same for the same', () => {
		const first = SEEDS.map((seed) => scrambledSobolPoint(3, 40, seed));
		expect(new Set(first.flat()).size).toBe(SEEDS.length * 40);
		expect(SEEDS.map((seed) => scrambledSobolPoint(3, 40, seed))).toEqual(first);
	});

	it('lie anywhere: over seeds, one point is as even as chance', () => {
		const counts = Array.from({ length: 16 }, () => 0);
		const SEEDS_TRIED = 4096;
		for (let seed = 0; seed < SEEDS_TRIED; seed++) {
			counts[Math.floor(scrambledSobolCoordinate(0, 7, seed) * 16)]!++;
		}
		const expected = SEEDS_TRIED / 16;
		const chiSquare = counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0);
		// 15 degrees of freedom: beyond 37.7 lies one in a thousand.
		expect(chiSquare).toBeLessThan(37.7);
	});

	it('never touch the ends', () => {
		const all = Array.from({ length: 512 }, (_, index) => scrambledSobolPoint(index, 40, 9)).flat();
		expect(Math.min(...all)).toBeGreaterThan(0);
		expect(Math.max(...all)).toBeLessThan(1);
	});

	it('integrate a smooth function far better than chance would', () => {
		const DIMENSIONS = 8;
		const means = SEEDS.map((seed) => {
			let sum = 0;
			for (let index = 0; index < 1024; index++) {
				const point = scrambledSobolPoint(index, DIMENSIONS, seed);
				sum += point.reduce((product, x) => product * (1 + 0.5 * (x - 0.5)), 1);
			}
			return sum / 1024;
		});
		// Chance would miss by √((1 + 1/48)⁸ − 1)/√1024 = 0.013.
		for (const mean of means) expect(Math.abs(mean - 1)).toBeLessThan(0.001);
	});
});

describe('the hash behind the scrambling', () => {
	it('maps different words to different words', () => {
		const mixed = Array.from({ length: 20_000 }, (_, word) => mixBits(word));
		expect(new Set(mixed).size).toBe(20_000);
	});

	it('turns over half of the bits when one bit is turned', () => {
		let turned = 0;
		for (let word = 1; word <= 200; word++) {
			for (let bit = 0; bit < 32; bit++) {
				const difference = mixBits(word) ^ mixBits(word ^ (1 << bit));
				turned += (difference >>> 0).toString(2).replaceAll('0', '').length;
			}
		}
		expect(Math.abs(turned / (200 * 32 * 32) - 0.5)).toBeLessThan(0.01);
	});

	it('minds the order of the words', () => {
		expect(new Set([hashWords(1, 2, 3), hashWords(3, 2, 1), hashWords(1, 2), hashWords(1, 2, 0)]).size).toBe(
			4
		);
	});
});

describe('points that there are not', () => {
	it('are refused with what is wrong', () => {
		expect(() => sobolCoordinate(-1, 0)).toThrow('index is -1');
		expect(() => sobolCoordinate(0.5, 0)).toThrow('index is 0.5');
		expect(() => sobolCoordinate(0, SOBOL_DIMENSIONS)).toThrow(`dimension is ${SOBOL_DIMENSIONS}`);
		expect(() => sobolPoint(0, SOBOL_DIMENSIONS + 1)).toThrow('dimensions is');
		expect(() => scrambledSobolPoint(0, 2, 2 ** 32)).toThrow('seed is 4294967296');
	});
});
