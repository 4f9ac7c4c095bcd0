import { describe, expect, it } from 'vitest';
import { findCrossing, findRoots, readCubic, type Cubic } from './crossings';
import type { HeatSystem } from './heat-system';
import { Integrator } from './integrator';
import { RosenbrockStepper } from './rosenbrock';
import { readStep, type Step } from './stepper';
import { factorise, planSparseLu, solveFactorised } from './sparse-lu';

/**
 * dT0/dt = −T0/50 + sin(t/20), dT1/dt = −4 (T1 − T0) (stiff), dT2/dt = −1e-4 T2²: linear, stiff, non-linear and
 * driven in time at once.
 */
class TestSystem implements HeatSystem {
	readonly size = 3;
	readonly capacityJPerK = Float64Array.of(2, 1, 5);
	readonly pattern = [
		[0, 0],
		[1, 0],
		[1, 1],
		[2, 2]
	] as const;
	private timeS = 0;

	setTime(timeS: number): void {
		this.timeS = timeS;
	}

	sumHeats([a = 0, b = 0, c = 0]: Float64Array, heats: Float64Array): void {
		heats.set([2 * (-a / 50 + Math.sin(this.timeS / 20)), -4 * (b - a), -5e-4 * c * c]);
	}

	fillJacobian(temps: Float64Array, jacobian: Float64Array): void {
		jacobian.set([-2 / 50, 0, 0, 4, -4, 0, 0, 0, -1e-3 * temps[2]!]);
	}

	sumThroughput(throughput: Float64Array): void {
		throughput.fill(1);
	}
}

const START = Float64Array.of(30, 30, 200);

/** The first and the third have closed forms. */
function exact(timeS: number): [number, number] {
	const rate = 1 / 50;
	const turn = 1 / 20;
	const wave = (rate * Math.sin(turn * timeS) - turn * Math.cos(turn * timeS)) / (rate ** 2 + turn ** 2);
	const first = wave + (30 + turn / (rate ** 2 + turn ** 2)) * Math.exp(-rate * timeS);
	return [first, 1 / (1 / 200 + 1e-4 * timeS)];
}

function runFixed(lengthS: number, endS: number): Float64Array {
	const stepper = new RosenbrockStepper(new TestSystem());
	const temps = Float64Array.from(START);
	for (let k = 0; k < Math.round(endS / lengthS); k++) {
		// A short interval for the time derivative, so that its own small error does not show.
		stepper.prepare(k * lengthS, temps, 1e-2, false);
		stepper.tryStep(lengthS);
		temps.set(stepper.step.to);
	}
	return temps;
}

describe('the Rosenbrock method', () => {
	it('is of order four: half the step, a sixteenth of the error', () => {
		const errors = [8, 4, 2].map((lengthS) => {
			const temps = runFixed(lengthS, 80);
			const [first, third] = exact(80);
			return [Math.abs(temps[0]! - first), Math.abs(temps[2]! - third)];
		});
		for (const node of [0, 1]) {
			expect(Math.log2(errors[0]![node]! / errors[1]![node]!)).toBeGreaterThan(3.6);
			expect(Math.log2(errors[1]![node]! / errors[2]![node]!)).toBeGreaterThan(3.6);
		}
	});

	it('reads the inside of a step to order three', () => {
		const errorAt = (lengthS: number) => {
			const stepper = new RosenbrockStepper(new TestSystem());
			stepper.prepare(0, START, lengthS, false);
			stepper.tryStep(lengthS);
			return Math.abs(readStep(stepper.step, 0, 0.4) - exact(0.4 * lengthS)[0]);
		};
		expect(Math.log2(errorAt(8) / errorAt(4))).toBeGreaterThan(3.5);
	});

	it('is not shaken by a step of a hundred time constants', () => {
		const stepper = new RosenbrockStepper(new TestSystem());
		stepper.prepare(0, Float64Array.of(30, 500, 1), 25, false);
		stepper.tryStep(25);
		expect(Math.abs(stepper.step.to[1]! - stepper.step.to[0]!)).toBeLessThan(50);
	});
});

describe('the integrator', () => {
	const run = (toleranceK: number, mostSteps = 10_000) => {
		const temps = Float64Array.from(START);
		const options = { toleranceK: new Float64Array(3).fill(toleranceK), mostSteps };
		const stepper = new RosenbrockStepper(new TestSystem());
		const integrator = new Integrator(stepper, options);
		const reached = integrator.advance(
			0,
			600,
			temps,
			() => null,
			() => {}
		);
		return { reached, temps, integrator, stepper };
	};

	it('keeps near the tolerance and within a budget of evaluations', () => {
		const { temps, stepper } = run(1e-4);
		const [first, third] = exact(600);
		expect(Math.abs(temps[0]! - first)).toBeLessThan(1e-3);
		expect(Math.abs(temps[2]! - third)).toBeLessThan(1e-3);
		expect(stepper.evaluations).toBeLessThan(2000);
	});

	it('gives up after the steps that it may take', () => {
		const { reached, integrator } = run(1e-8, 20);
		expect([reached, integrator.failure]).toEqual(['failed', 'too_many_steps']);
	});

	it('repeats the step up to where it is stopped', () => {
		const temps = Float64Array.from(START);
		const options = { toleranceK: new Float64Array(3).fill(1e-5), mostSteps: 10_000 };
		const integrator = new Integrator(new RosenbrockStepper(new TestSystem()), options);
		const reached = integrator.advance(
			0,
			600,
			temps,
			(step) => findCrossing(step, [2], 150, 'fall'),
			() => {}
		);
		expect(reached).toBe('stop');
		// 1/150 = 1/200 + 1e-4 t
		expect(integrator.timeS).toBeCloseTo((1 / 150 - 1 / 200) / 1e-4, 3);
		expect(temps[2]).toBeCloseTo(150, 4);
	});
});

describe('a heat that bends sharply', () => {
	/** dT/dt = 1 below 50, 0.2 above. */
	class BentSystem implements HeatSystem {
		readonly size = 1;
		readonly capacityJPerK = Float64Array.of(1);
		readonly pattern = [[0, 0]] as const;
		setTime(): void {}
		sumHeats(temps: Float64Array, heats: Float64Array): void {
			heats[0] = temps[0]! < 50 ? 1 : 0.2;
		}
		fillJacobian(_temps: Float64Array, jacobian: Float64Array): void {
			jacobian[0] = 0;
		}
		sumThroughput(throughput: Float64Array): void {
			throughput.fill(1);
		}
	}
	const passage = (step: Step) => {
		const passes = step.from[0]! < 50 && step.to[0]! > 50.0001;
		return passes ? (findRoots(readCubic(step, 0), 50.00001)[0] ?? null) : null;
	};

	it('ends a step where it does, and goes on from there', () => {
		const temps = Float64Array.of(30);
		const integrator = new Integrator(new RosenbrockStepper(new BentSystem()), {
			toleranceK: Float64Array.of(1e-3),
			mostSteps: 1000,
			findBend: passage,
			afterBendS: 5
		});
		const ends: number[] = [];
		integrator.advance(
			0,
			100,
			temps,
			() => null,
			(step) => ends.push(step.timeS + step.lengthS)
		);
		expect(temps[0]).toBeCloseTo(50 + 0.2 * 80, 4);
		expect(Math.min(...ends.map((end) => Math.abs(end - 20)))).toBeLessThan(1e-3);
	});
});

describe('sparse elimination', () => {
	it('solves as the product with the matrix says', () => {
		const rows = [
			[4, -1, 0, -1],
			[-1, 5, -2, 0],
			[0, -2, 6, 0],
			[-1, 0, -3, 7]
		];
		const pattern = rows.flatMap((row, i) =>
			row.flatMap((value, j) => (value === 0 ? [] : [[i, j] as const]))
		);
		const plan = planSparseLu(4, pattern);
		const matrix = Float64Array.from(rows.flat());
		const wanted = [1, -2, 3, 0.5];
		const vector = Float64Array.from(rows, (row) =>
			row.reduce((sum, value, j) => sum + value * wanted[j]!, 0)
		);
		expect(factorise(plan, matrix)).toBe(true);
		solveFactorised(plan, matrix, vector);
		wanted.forEach((value, k) => expect(vector[k]).toBeCloseTo(value, 12));
	});

	it('says when a pivot is zero', () => {
		expect(factorise(planSparseLu(1, [[0, 0]]), Float64Array.of(0))).toBe(false);
	});
});

describe('crossings inside a step', () => {
	/** A step whose node k follows the cubic a0 + a1 s + a2 s² + a3 s³. */
	function stepOf(...cubics: Cubic[]): Step {
		const column = (read: (cubic: Cubic) => number) => Float64Array.from(cubics, read);
		return {
			timeS: 0,
			lengthS: 100,
			from: column(([a0]) => a0),
			to: column(([a0, a1, a2, a3]) => a0 + a1 + a2 + a3),
			inner2: column(([, , a2, a3]) => -a2 - a3),
			inner3: column(([, , , a3]) => -a3),
			error: column(() => 0)
		};
	}
	/** 40 + 12 s − 12 s²: up to 43 in the middle and back. */
	const hump: Cubic = [40, 12, -12, 0];

	it('finds the way up and the way down of a hump whose ends are both below', () => {
		const step = stepOf(hump);
		expect(findCrossing(step, [0], 42, 'reach')).toBeCloseTo(0.5 - Math.sqrt(1 / 12), 9);
		expect(findRoots(hump, 42)[1]).toBeCloseTo(0.5 + Math.sqrt(1 / 12), 9);
		expect(findCrossing(step, [0], 43.001, 'reach')).toBeNull();
	});

	it('watches the hotter of two nodes', () => {
		const step = stepOf([40, 10, 0, 0], [55, -20, 0, 0]);
		expect(findCrossing(step, [0, 1], 60, 'reach')).toBeNull();
		expect(findCrossing(step, [0, 1], 45, 'fall')).toBeCloseTo(0.5, 12);
		expect(findCrossing(step, [0, 1], 44.9, 'fall')).toBeNull();
	});

	it('counts standing at the level as reached but not as left', () => {
		const level = stepOf([50, 0, 0, 0]);
		expect(findCrossing(level, [0], 50, 'reach')).toBe(0);
		expect(findCrossing(level, [0], 50, 'leave')).toBeNull();
	});
});
