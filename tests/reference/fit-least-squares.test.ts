import { describe, expect, it } from 'vitest';
import { fitLeastSquares, type LeastSquaresProblem } from '../../src/lib/thermal/fit';
import { checkAgainst } from './support/check-against';

const X = [0, 1, 2, 3, 4];
const Y = [1.1, 2.9, 5.2, 6.8, 9.1];
/** A straight line through five points, each known to ±0.2. */
const LINE: LeastSquaresProblem = {
	residuals: ([a = 0, b = 0]) => X.map((x, k) => (a + b * x - Y[k]!) / 0.2),
	start: [0, 0],
	residualsIn: 'standard deviations'
};
const change = (of: Partial<LeastSquaresProblem>): LeastSquaresProblem => ({ ...LINE, ...of });
const own = (residuals: LeastSquaresProblem['residuals'], start: number[]): LeastSquaresProblem => ({
	residuals,
	start,
	residualsIn: 'own unit'
});

describe('test functions with a known minimum', () => {
	const from = {
		source: 'Moré, Garbow and Hillstrom, ACM Trans. Math. Softw. 7 (1981) 17',
		standing: 'from memory' as const,
		unit: '',
		tolerance: { absolute: 1e-8 },
		because: 'the minimum is exactly 0 or 1, the derivatives by differences have ten digits'
	};
	const rosenbrock = () =>
		fitLeastSquares(own(([x = 0, y = 0]) => [10 * (y - x * x), 1 - x], [-1.2, 1])).parameters;
	checkAgainst({ ...from, name: 'Rosenbrock, x', place: 'problem 1', expected: 1 }, () => rosenbrock()[0]!);
	checkAgainst({ ...from, name: 'Rosenbrock, y', place: 'problem 1', expected: 1 }, () => rosenbrock()[1]!);
	const helix = () =>
		fitLeastSquares(
			own(
				([x = 0, y = 0, z = 0]) => [
					10 * (z - (10 * Math.atan2(y, x)) / (2 * Math.PI)),
					10 * (Math.hypot(x, y) - 1),
					z
				],
				[-1, 0, 0]
			)
		).parameters;
	[1, 0, 0].forEach((expected, k) =>
		checkAgainst({ ...from, name: `helical valley, coordinate ${k + 1}`, place: 'problem 7', expected }, () =>
			Math.abs(helix()[k]!)
		)
	);
	const freudenstein = () =>
		fitLeastSquares(
			own(([x = 0, y = 0]) => [-13 + x + ((5 - y) * y - 2) * y, -29 + x + ((y + 1) * y - 14) * y], [6, 5])
		).parameters;
	[5, 4].forEach((expected, k) =>
		checkAgainst(
			{ ...from, name: `Freudenstein and Roth, coordinate ${k + 1}`, place: 'problem 2', expected },
			() => freudenstein()[k]!
		)
	);
});

describe('a straight line', () => {
	// Sums over the five points: n = 5, Σx = 10, Σx² = 30, Σy = 25.1, Σxy = 70.1; determinant 50.
	const slope = (5 * 70.1 - 10 * 25.1) / 50;
	const intercept = (30 * 25.1 - 10 * 70.1) / 50;

	it('is found as by hand, with errors from what is known of the data', () => {
		const { parameters, standardErrors, covariance, status } = fitLeastSquares(LINE);
		expect(status).toBe('converged');
		expect(parameters[0]).toBeCloseTo(intercept, 9);
		expect(parameters[1]).toBeCloseTo(slope, 9);
		expect(standardErrors[0]).toBeCloseTo(0.2 * Math.sqrt(30 / 50), 9);
		expect(standardErrors[1]).toBeCloseTo(0.2 * Math.sqrt(5 / 50), 9);
		expect(covariance![0]![1]).toBeCloseTo((-0.04 * 10) / 50, 9);
		expect(covariance![1]![0]).toBe(covariance![0]![1]);
	});

	it('has errors from the spread of the residuals when nothing is known of the data', () => {
		const fit = fitLeastSquares(own(([a = 0, b = 0]) => X.map((x, k) => a + b * x - Y[k]!), [0, 0]));
		const spread = fit.residualSumOfSquares / 3;
		expect(fit.degreesOfFreedom).toBe(3);
		expect(fit.standardErrors[1]! ** 2).toBeCloseTo((spread * 5) / 50, 9);
	});

	it('does not mind the units of its parameters', () => {
		const small = fitLeastSquares(
			own(([a = 0, b = 0]) => X.map((x, k) => a * 1e6 + b * 1e-4 * x - Y[k]!), [1e-6, 1])
		);
		expect(small.parameters[0]! * 1e6).toBeCloseTo(intercept, 8);
		expect(small.parameters[1]! * 1e-4).toBeCloseTo(slope, 8);
	});

	it('is fitted exactly by two points, with no errors to be had from them', () => {
		const fit = fitLeastSquares(own(([a = 0, b = 0]) => [a - 1, a + b - 3], [0, 0]));
		expect(fit.parameters).toEqual([expect.closeTo(1, 9), expect.closeTo(2, 9)]);
		expect(fit.covariance).toBeNull();
		expect(fit.standardErrors).toEqual([null, null]);
	});
});

describe('priors', () => {
	it('weigh with the data by their variances', () => {
		// One datum 4 ± 2 and one belief 10 ± 1: mean (4/4 + 10/1)/(1/4 + 1), variance 1/(1/4 + 1).
		const fit = fitLeastSquares({
			residuals: ([p = 0]) => [(p - 4) / 2],
			start: [0],
			priors: [{ mean: 10, sd: 1 }],
			residualsIn: 'standard deviations'
		});
		expect(fit.parameters[0]).toBeCloseTo(8.8, 9);
		expect(fit.standardErrors[0]! ** 2).toBeCloseTo(0.8, 9);
		expect(fit.residualSumOfSquares).toBeCloseTo(2.4 ** 2, 8);
		expect(fit.objective).toBeCloseTo(2.4 ** 2 + 1.2 ** 2, 8);
	});

	it('hold what the data say nothing of', () => {
		const fit = fitLeastSquares(
			change({
				residuals: ([a = 0, b = 0]) => X.map((x, k) => (a + b * x - Y[k]!) / 0.2),
				start: [0, 0, 0],
				priors: [null, null, { mean: 7, sd: 0.5 }]
			})
		);
		expect(fit.parameters[2]).toBeCloseTo(7, 9);
		expect(fit.standardErrors[2]).toBeCloseTo(0.5, 9);
		expect(fit.status).toBe('converged');
	});

	it('that believe nearly nothing change nearly nothing', () => {
		const free = fitLeastSquares(LINE);
		const weak = { mean: -40, sd: 1e7 };
		const held = fitLeastSquares(change({ priors: [weak, weak] }));
		held.parameters.forEach((value, k) => expect(value).toBeCloseTo(free.parameters[k]!, 8));
	});

	it('are refused with residuals of which nobody says how certain they are', () => {
		expect(() =>
			fitLeastSquares(change({ residualsIn: 'own unit', priors: [{ mean: 0, sd: 1 }, null] }))
		).toThrow('priors is 1: it must be none where residuals are not in standard deviations.');
		expect(() => fitLeastSquares(change({ priors: [{ mean: 0, sd: 0 }, null] }))).toThrow(
			'priors[0].sd is 0'
		);
		expect(() => fitLeastSquares(change({ priors: [null] }))).toThrow('priors.length is 1');
	});
});

describe('bounds', () => {
	it('hold a parameter that would go beyond, and the others do their best', () => {
		const fit = fitLeastSquares(change({ bounds: [null, { high: 1.5 }] }));
		expect(fit.status).toBe('converged');
		expect(fit.parameters[1]).toBe(1.5);
		// With the slope held, the intercept is the mean of y − 1.5 x.
		expect(fit.parameters[0]).toBeCloseTo(25.1 / 5 - 1.5 * 2, 8);
		expect(fit.atBound).toEqual([false, true]);
		expect(fit.standardErrors[0]).toBeCloseTo(0.2 / Math.sqrt(5), 8);
		expect(fit.standardErrors[1]).toBeNull();
		expect(fit.covariance![1]).toEqual([0, 0]);
	});

	it('that are not in the way change nothing', () => {
		const free = fitLeastSquares(LINE);
		const wide = fitLeastSquares(change({ bounds: [{ low: -5, high: 5 }, { low: 0 }] }));
		wide.parameters.forEach((value, k) => expect(value).toBeCloseTo(free.parameters[k]!, 9));
		expect(wide.atBound).toEqual([false, false]);
	});

	it('let a parameter go again that starts at one', () => {
		const fit = fitLeastSquares(change({ start: [0, 5], bounds: [null, { high: 5 }] }));
		expect(fit.parameters[1]).toBeCloseTo(fitLeastSquares(LINE).parameters[1]!, 8);
	});

	it('are never passed, not even for a derivative', () => {
		const seen: number[] = [];
		fitLeastSquares({
			residuals: ([p = 0]) => {
				seen.push(p);
				return [Math.sqrt(p) + 1, p];
			},
			start: [2],
			bounds: [{ low: 0 }],
			residualsIn: 'own unit'
		});
		expect(Math.min(...seen)).toBe(0);
	});

	it('are refused when they are out of order or the start lies beyond', () => {
		expect(() => fitLeastSquares(change({ bounds: [{ low: 2, high: 1 }, null] }))).toThrow(
			'bounds[0].low is 2'
		);
		expect(() => fitLeastSquares(change({ bounds: [{ low: 1 }, null] }))).toThrow(
			'start[0] is 0: it must be within 1 to Infinity.'
		);
	});
});

describe('fits that cannot succeed', () => {
	it('say so when the residuals are not finite at the start', () => {
		const fit = fitLeastSquares(own(([p = 0]) => [Math.log(p), 1], [-1]));
		expect([fit.status, fit.covariance, fit.evaluations]).toEqual(['not finite at the start', null, 1]);
		expect(fit.parameters).toEqual([-1]);
	});

	it('go on where only a trial is not finite', () => {
		const fit = fitLeastSquares(own(([p = 0]) => [Math.log(p) - 1, (Math.log(p) - 1) / 2], [0.01]));
		expect(fit.status).toBe('converged');
		expect(fit.parameters[0]).toBeCloseTo(Math.E, 8);
	});

	it('say when the evaluations are used up, with the best so far', () => {
		const rosenbrock = own(([x = 0, y = 0]) => [10 * (y - x * x), 1 - x], [-1.2, 1]);
		const short = fitLeastSquares({ ...rosenbrock, mostEvaluations: 20 });
		expect(short.status).toBe('evaluations used up');
		expect(short.objective).toBeLessThan(24.2);
		expect(short.evaluations).toBeLessThan(30);
	});

	it('give no errors where two parameters do one thing', () => {
		const fit = fitLeastSquares(own(([a = 0, b = 0]) => X.map((x, k) => (a + b) * x - Y[k]!), [1, 1]));
		expect(fit.covariance).toBeNull();
		expect(fit.standardErrors).toEqual([null, null]);
		expect(fit.parameters[0]! + fit.parameters[1]!).toBeCloseTo(70.1 / 30, 8);
	});

	it('end where nothing has any effect', () => {
		const fit = fitLeastSquares(own(() => [1, 2], [3]));
		expect([fit.status, fit.parameters[0], fit.covariance]).toEqual(['converged', 3, null]);
	});

	it('are refused when there are fewer residuals than parameters, or none of either', () => {
		expect(() => fitLeastSquares(own(([a = 0]) => [a], [1, 2]))).toThrow(
			'residuals.length is 1: it must be at least 2, one a parameter.'
		);
		expect(() => fitLeastSquares(own(() => [], []))).toThrow('start.length is 0');
		expect(() => fitLeastSquares(own(() => [1], [NaN]))).toThrow('start[0] is NaN');
		expect(() => fitLeastSquares(change({ mostEvaluations: 0 }))).toThrow('mostEvaluations is 0');
	});
});
