import { describe, expect, it } from 'vitest';
import {
	estimateSensitivity,
	planSensitivity,
	readSensitivity,
	type SensitivityResult
} from '../../src/lib/thermal/statistics';
import { checkAgainst, STANDINGS } from './support/check-against';

const SIZE = { pointsEach: 1024, replicates: 8, seed: 1 };

type Model = (point: readonly number[]) => number;

/** sin x₁ + 7 sin² x₂ + 0.1 x₃⁴ sin x₁ on −π…π. */
const ishigami: Model = (point) => {
	const [x1 = 0, x2 = 0, x3 = 0] = point.map((u) => Math.PI * (2 * u - 1));
	return Math.sin(x1) + 7 * Math.sin(x2) ** 2 + 0.1 * x3 ** 4 * Math.sin(x1);
};

const sobolG =
	(a: readonly number[]): Model =>
	(point) =>
		point.reduce((product, u, k) => product * ((Math.abs(4 * u - 2) + a[k]!) / (1 + a[k]!)), 1);

const G_EIGHT = [0, 1, 4.5, 9, 99, 99, 99, 99];
const G_SIX = [78, 12, 0.5, 2, 97, 33];

interface TestFunction {
	name: string;
	source: string;
	model: Model;
	mean: number;
	variance: number;
	firstOrder: number[];
	totalEffect: number[];
}

const FUNCTIONS: TestFunction[] = [
	{
		name: 'Ishigami',
		source: 'Ishigami and Homma (1990), a = 7, b = 0.1; as in the tests of SALib',
		model: ishigami,
		mean: 3.5,
		variance: 13.8445879,
		firstOrder: [0.3139052, 0.4424111, 0],
		totalEffect: [0.5575889, 0.4424111, 0.2436837]
	},
	{
		name: 'Sobol g of eight',
		source: 'Sobol g, a = 0, 1, 4.5, 9, 99 (4 times); as in the tests of SALib',
		model: sobolG(G_EIGHT),
		mean: 1,
		variance: 0.4654244,
		firstOrder: [0.7161922, 0.179048, 0.0236758, 0.0071619, 0.0000716, 0.0000716, 0.0000716, 0.0000716],
		totalEffect: [0.7871441, 0.2421982, 0.0343169, 0.0104604, 0.0001049, 0.0001049, 0.0001049, 0.0001049]
	},
	{
		name: 'Sobol g of six',
		source: 'Sobol g, a = 78, 12, 0.5, 2, 97, 33; as in the tests of SALib',
		model: sobolG(G_SIX),
		mean: 1,
		variance: 0.19347,
		firstOrder: [0.000276, 0.010195, 0.765743, 0.191436, 0.000179, 0.00149],
		totalEffect: G_SIX.map((a) => totalOfG(G_SIX, a))
	},
	{
		name: 'x + 2y + 3z',
		source: 'closed form: shares of the squares of the factors',
		model: ([x = 0, y = 0, z = 0]) => x + 2 * y + 3 * z,
		mean: 3,
		variance: 14 / 12,
		firstOrder: [1 / 14, 4 / 14, 9 / 14],
		totalEffect: [1 / 14, 4 / 14, 9 / 14]
	}
];

/** Vᵢ Π(1 + Vₖ, k ≠ i)/V with Vₖ = 1/(3(1 + aₖ)²): the closed form of the g-function. */
function totalOfG(all: readonly number[], a: number): number {
	const part = (of: number) => 1 / (3 * (1 + of) ** 2);
	const whole = all.reduce((product, of) => product * (1 + part(of)), 1);
	return ((part(a) / (1 + part(a))) * whole) / (whole - 1);
}

describe('sensitivity of functions whose indices are known', () => {
	for (const { name, source, model, mean, variance, firstOrder, totalEffect } of FUNCTIONS) {
		let done: SensitivityResult | undefined;
		const result = () => (done ??= estimateSensitivity(model, { dimensions: firstOrder.length, ...SIZE }));
		const from = { source, place: 'closed form', unit: '' };
		const read = { standing: source.includes('SALib') ? STANDINGS[0] : STANDINGS[1] };
		const worked = { standing: STANDINGS[1] };
		const because = 'sampling: about three standard errors of 8 × 1024 scrambled points';
		const share = { ...from, tolerance: { absolute: 0.006 }, because };
		const size = { ...from, tolerance: { relative: 0.006 }, because };

		checkAgainst({ name: `${name}: mean`, expected: mean, ...size, ...worked }, () => result().mean.value);
		checkAgainst(
			{ name: `${name}: variance`, expected: variance, ...size, ...worked },
			() => result().variance.value
		);
		firstOrder.forEach((expected, k) =>
			checkAgainst(
				{ name: `${name}: first-order index ${k + 1}`, expected, ...share, ...read },
				() => result().firstOrder[k]!.value
			)
		);
		totalEffect.forEach((expected, k) =>
			checkAgainst(
				{ name: `${name}: total effect ${k + 1}`, expected, ...share, ...worked },
				() => result().totalEffect[k]!.value
			)
		);
	}
});

describe('standard errors', () => {
	it('say how far off the estimates are, over many seeds', () => {
		const exact = 0.5575889;
		const pulls = Array.from({ length: 40 }, (_, seed) => {
			const { totalEffect } = estimateSensitivity(ishigami, {
				dimensions: 3,
				pointsEach: 128,
				replicates: 8,
				seed
			});
			return (totalEffect[0]!.value - exact) / totalEffect[0]!.standardError;
		});
		const meanSquare = pulls.reduce((sum, pull) => sum + pull * pull, 0) / pulls.length;
		// Student's t with 7 degrees of freedom has a variance of 1.4.
		expect(meanSquare).toBeGreaterThan(0.5);
		expect(meanSquare).toBeLessThan(3);
	});

	it('fall faster than chance allows when there are more points', () => {
		const error = (pointsEach: number) =>
			estimateSensitivity(ishigami, { dimensions: 3, pointsEach, replicates: 16, seed: 3 }).mean
				.standardError;
		// By chance sixteen times the points give a quarter of the error.
		expect(error(1024)).toBeLessThan(error(64) / 8);
	});
});

describe('a sensitivity plan', () => {
	const options = { dimensions: 3, pointsEach: 4, replicates: 2, seed: 5 };

	it('asks for A, B and each column of B in A, row by row', () => {
		const plan = planSensitivity(options);
		expect(plan.count).toBe(2 * 4 * 5);
		const row = Array.from({ length: 5 }, (_, k) => plan.pointAt(15 + k));
		const [a = [], b = []] = row;
		for (let input = 0; input < 3; input++) {
			expect(row[input + 2]).toEqual(a.map((value, k) => (k === input ? b[k] : value)));
		}
	});

	it('has points of their own in each replicate', () => {
		const plan = planSensitivity(options);
		const all = Array.from({ length: 40 }, (_, k) => plan.pointAt(k)).filter((_, k) => k % 5 < 2);
		expect(new Set(all.flat()).size).toBe(16 * 3);
	});

	it('gives the same result when it is evaluated in any order', () => {
		const plan = planSensitivity(options);
		const values = new Float64Array(plan.count);
		for (let k = plan.count - 1; k >= 0; k--) values[k] = ishigami(plan.pointAt(k));
		expect(readSensitivity(plan, values)).toEqual(estimateSensitivity(ishigami, options));
	});

	it('does not mind what is added to the model', () => {
		const far = { dimensions: 3, pointsEach: 256, replicates: 4, seed: 2 };
		const plain = estimateSensitivity(ishigami, far);
		const lifted = estimateSensitivity((point) => ishigami(point) + 1000, far);
		plain.firstOrder.forEach(({ value }, k) => expect(lifted.firstOrder[k]!.value).toBeCloseTo(value, 8));
		plain.totalEffect.forEach(({ value }, k) => expect(lifted.totalEffect[k]!.value).toBeCloseTo(value, 8));
	});

	it('finds nothing where nothing varies', () => {
		const result = estimateSensitivity(() => 7, options);
		expect(result.variance).toEqual({ value: 0, standardError: 0 });
		expect(result.totalEffect).toEqual(Array(3).fill({ value: 0, standardError: 0 }));
	});

	it('sees an input that does nothing', () => {
		const { firstOrder, totalEffect } = estimateSensitivity(([x = 0]) => x * x, options);
		expect([firstOrder[1], totalEffect[1]]).toEqual(Array(2).fill({ value: 0, standardError: 0 }));
		expect(totalEffect[0]!.value).toBeGreaterThan(0.5);
	});

	it('is refused when its numbers are not whole, and values when one is missing', () => {
		const plan = (change: object) => () => planSensitivity({ ...options, ...change });
		expect(plan({ dimensions: 65 })).toThrow('dimensions is 65: it must be a whole number within 1 to 64.');
		expect(plan({ pointsEach: 100 })).toThrow('pointsEach is 100');
		expect(plan({ replicates: 1 })).toThrow('replicates is 1');
		expect(() => planSensitivity(options).pointAt(40)).toThrow('evaluation is 40');
		expect(plan({ seed: 0.5 })).toThrow('seed is 0.5');
		expect(() => readSensitivity(planSensitivity(options), [1])).toThrow(
			'values.length is 1: it must be 40.'
		);
		expect(() => estimateSensitivity(() => NaN, options)).toThrow('values[0] is NaN');
	});
});
