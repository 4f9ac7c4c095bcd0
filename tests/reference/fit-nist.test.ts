import { describe, expect, it } from 'vitest';
import { fitLeastSquares, type Fit } from '../../src/lib/thermal/fit';
import { checkAgainst, STANDINGS } from './support/check-against';
import { readText } from './support/reference-data';

interface NistSet {
	name: string;
	level: string;
	starts: number[][];
	certified: number[];
	standardErrors: number[];
	residualSumOfSquares: number;
	x: number[];
	y: number[];
}
type Model = (b: readonly number[], x: number) => number;

const cubicOverCubic: Model = ([b1 = 0, b2 = 0, b3 = 0, b4 = 0, b5 = 0, b6 = 0, b7 = 0], x) =>
	(b1 + x * (b2 + x * (b3 + x * b4))) / (1 + x * (b5 + x * (b6 + x * b7)));
const saturating: Model = ([b1 = 0, b2 = 0], x) => b1 * (1 - Math.exp(-b2 * x));

const MODELS: Record<string, Model> = {
	misra1a: saturating,
	lanczos3: ([b1 = 0, b2 = 0, b3 = 0, b4 = 0, b5 = 0, b6 = 0], x) =>
		b1 * Math.exp(-b2 * x) + b3 * Math.exp(-b4 * x) + b5 * Math.exp(-b6 * x),
	hahn1: cubicOverCubic,
	mgh09: ([b1 = 0, b2 = 0, b3 = 0, b4 = 0], x) => (b1 * (x * x + x * b2)) / (x * x + x * b3 + b4),
	thurber: cubicOverCubic,
	rat43: ([b1 = 0, b2 = 0, b3 = 0, b4 = 0], x) => b1 / (1 + Math.exp(b2 - b3 * x)) ** (1 / b4),
	eckerle4: ([b1 = 0, b2 = 0, b3 = 0], x) => (b1 / b2) * Math.exp(-0.5 * ((x - b3) / b2) ** 2),
	boxbod: saturating,
	bennett5: ([b1 = 0, b2 = 0, b3 = 0], x) => b1 * (b2 + x) ** (-1 / b3)
};
/** What the data, or the certified parameters, were not read of but remembered. */
const REMEMBERED = ['lanczos3', 'boxbod'];

function fit(set: NistSet, model: Model, start: readonly number[]): Fit {
	const residuals = (b: readonly number[]) => set.x.map((x, k) => model(b, x) - set.y[k]!);
	return fitLeastSquares({ residuals, start, residualsIn: 'own unit' });
}

describe.each(Object.keys(MODELS))('NIST %s', (key) => {
	const set = JSON.parse(readText(`nist-strd/${key}.json`)) as NistSet;
	const model = MODELS[key]!;
	const read = REMEMBERED.includes(key) ? STANDINGS[2] : STANDINGS[0];
	const from = {
		source: 'NIST Statistical Reference Datasets, Nonlinear Regression',
		unit: '',
		because: 'six digits, as one asks of programs; an own derivative by differences leaves about eight'
	};

	it('gives the certified sum of squares at the certified parameters, so that no datum is mistyped', () => {
		const sum = set.x.reduce((total, x, k) => total + (model(set.certified, x) - set.y[k]!) ** 2, 0);
		expect(Math.abs(sum / set.residualSumOfSquares - 1)).toBeLessThan(1e-9);
	});

	set.starts.forEach((start, at) => {
		let done: Fit | undefined;
		const result = () => (done ??= fit(set, model, start));
		const place = `${set.name} (${set.level} level of difficulty), start ${at + 1}`;

		it(`converges from start ${at + 1}`, () => {
			expect(result().status).toBe('converged');
			expect(result().degreesOfFreedom).toBe(set.x.length - set.certified.length);
		});

		set.certified.forEach((expected, k) => {
			const name = `${set.name}, parameter ${k + 1}, from start ${at + 1}`;
			checkAgainst(
				{ ...from, name, place, standing: read, expected, tolerance: { relative: 1e-6 } },
				() => result().parameters[k]!
			);
		});
		set.standardErrors.forEach((expected, k) => {
			const name = `${set.name}, standard deviation of parameter ${k + 1}, from start ${at + 1}`;
			checkAgainst(
				{ ...from, name, place, standing: 'from memory', expected, tolerance: { relative: 1e-6 } },
				() => result().standardErrors[k]!
			);
		});
		checkAgainst(
			{
				...from,
				name: `${set.name}, residual sum of squares, from start ${at + 1}`,
				place,
				standing: STANDINGS[0],
				expected: set.residualSumOfSquares,
				tolerance: { relative: 1e-9 },
				because: 'at a minimum the sum of squares has twice the digits of the parameters'
			},
			() => result().residualSumOfSquares
		);
	});
});
