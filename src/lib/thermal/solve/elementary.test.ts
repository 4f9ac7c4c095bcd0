import { describe, expect, it } from 'vitest';
import { expOf, fifthRootOf, sineOf } from './elementary';

const between = (low: number, high: number, count = 5000) =>
	Array.from({ length: count }, (_, k) => low + ((high - low) * k) / (count - 1));
const furthest = (xs: number[], one: (x: number) => number, other: (x: number) => number) =>
	Math.max(...xs.map((x) => Math.abs(one(x) / other(x) - 1)));

describe('functions from basic operations', () => {
	it('have the exponential of the language to two units in the last place', () => {
		expect(furthest(between(-700, 700), expOf, Math.exp)).toBeLessThan(5e-16);
		expect(furthest(between(-1, 1), expOf, Math.exp)).toBeLessThan(5e-16);
	});

	it('have the ends of the exponential', () => {
		expect([expOf(0), expOf(-Infinity), expOf(-746), expOf(Infinity), expOf(710), expOf(NaN)]).toEqual([
			1,
			0,
			0,
			Infinity,
			Infinity,
			NaN
		]);
		expect(expOf(-740)).toBe(Math.exp(-740));
	});

	it('have the fifth root, also of very small and of large numbers', () => {
		expect(furthest(between(1e-9, 1), fifthRootOf, (x) => x ** 0.2)).toBeLessThan(3e-15);
		expect([0, 1, 1 / 32, 1024, 1e-300].map(fifthRootOf)).toEqual([0, 1, 0.5, 4, 1e-60]);
		expect(fifthRootOf(-1)).toBeNaN();
	});

	it('have the sine between 0 and π', () => {
		expect(Math.max(...between(0, Math.PI).map((x) => Math.abs(sineOf(x) - Math.sin(x))))).toBeLessThan(
			1e-13
		);
		expect([sineOf(-0.1), sineOf(3.2)]).toEqual([NaN, NaN]);
	});
});
