import { describe, expect, it } from 'vitest';
import {
	exchangeFactorParallel,
	KELVIN_AT_ZERO_C,
	radiateBetween,
	radiativeConductance,
	STEFAN_BOLTZMANN
} from '../../src/lib/thermal/correlations/radiation';
import { EngineInputError } from '../../src/lib/thermal/correlations/require';
import {
	viewFactorCoaxialDiscs,
	viewFactorParallelRectangles,
	viewFactorPerpendicularRectangles
} from '../../src/lib/thermal/correlations/view-factors';
import { readCases, type HandbookCase } from './support/reference-data';

const planes = (hotK: number, coldK: number, e1: number, e2: number, shields: [number, number][]) =>
	exchangeFactorParallel(e1, e2, shields) * STEFAN_BOLTZMANN * (hotK ** 4 - coldK ** 4);

type Formula = (...inputs: never[]) => number;
const FORMULAS: Record<string, Formula> = {
	flux: radiateBetween,
	planes,
	linearised: radiativeConductance,
	discs: viewFactorCoaxialDiscs,
	'parallel rectangles': viewFactorParallelRectangles,
	'perpendicular rectangles': viewFactorPerpendicularRectangles
};

function errorOf({ formula, inputs, expected }: HandbookCase): number {
	return Math.abs(FORMULAS[formula]!(...(inputs as never[])) / expected - 1);
}

describe('radiation and view factors against published values', () => {
	it.each(
		[...readCases('radiation'), ...readCases('view-factors')].map(
			(example) => [example.id, example.source, example] as const
		)
	)('%s (%s)', (_id, _source, example) => {
		expect(errorOf(example)).toBeLessThan(example.relativeTolerance);
	});

	it('lets N shields of one emissivity through to 1/(N + 1) (Incropera et al., eq. 13.29)', () => {
		const bare = exchangeFactorParallel(0.4, 0.4);
		for (const count of [1, 2, 3, 4]) {
			const shields = Array.from({ length: count }, () => [0.4, 0.4] as const);
			expect(exchangeFactorParallel(0.4, 0.4, shields) / bare).toBeCloseTo(1 / (count + 1), 12);
		}
	});
});

describe('radiation as it must behave', () => {
	it('goes neither way between equal temperatures and turns round with them', () => {
		expect(radiateBetween(2, 60, 60)).toBe(0);
		expect(radiateBetween(2, 60, 20)).toBe(-radiateBetween(2, 20, 60));
	});

	it('is carried exactly by its secant conductance', () => {
		for (const [hot, cold] of [
			[500, 60],
			[95, 94.999],
			[-40, 80]
		] as const) {
			expect(radiativeConductance(0.7, hot, cold) * (hot - cold)).toBeCloseTo(
				radiateBetween(0.7, hot, cold),
				9
			);
		}
	});

	it('is black between black planes', () => {
		expect(exchangeFactorParallel(1, 1)).toBe(1);
	});

	it('obeys reciprocity: A1 F12 = A2 F21', () => {
		const [r1, r2, gap] = [0.12, 0.3, 0.15];
		expect(r1 ** 2 * viewFactorCoaxialDiscs(r1, r2, gap)).toBeCloseTo(
			r2 ** 2 * viewFactorCoaxialDiscs(r2, r1, gap),
			14
		);
		const there = 0.5 * viewFactorPerpendicularRectangles(1, 0.5, 2);
		expect(2 * viewFactorPerpendicularRectangles(1, 2, 0.5)).toBeCloseTo(there, 12);
	});

	it('sees everything when close and the inverse square when far', () => {
		expect(viewFactorCoaxialDiscs(0.1, 0.1, 1e-6)).toBeCloseTo(1, 4);
		expect(viewFactorParallelRectangles(1, 1, 1e-3)).toBeCloseTo(1, 2);
		// Far away F12 → r2²/L².
		expect((viewFactorCoaxialDiscs(0.01, 0.01, 100) * 100 ** 2) / 0.01 ** 2).toBeCloseTo(1, 6);
	});

	it('keeps what a box sees of itself at one', () => {
		// A unit cube: one face sees the opposite one and four at right angles.
		const sum = viewFactorParallelRectangles(1, 1, 1) + 4 * viewFactorPerpendicularRectangles(1, 1, 1);
		expect(sum).toBeCloseTo(1, 12);
	});
});

describe('radiation outside its range', () => {
	it.each([
		['an emissivity of 0', () => exchangeFactorParallel(0, 0.5), 'emissivity1', 0],
		[
			'a shield that emits more than black',
			() => exchangeFactorParallel(0.5, 0.5, [[1.1, 0.5]]),
			'shieldFront',
			1.1
		],
		['a temperature below absolute zero', () => radiateBetween(1, -300, 20), 'temp1C', -300],
		['an area below zero', () => radiativeConductance(-1, 20, 30), 'exchangeAreaM2', -1],
		['discs that touch', () => viewFactorCoaxialDiscs(0.1, 0.1, 0), 'gapM', 0],
		['an endless gap', () => viewFactorParallelRectangles(1, 1, Infinity), 'gapM', Infinity],
		['a rectangle without width', () => viewFactorPerpendicularRectangles(1, 0, 1), 'width1M', 0]
	] as const)('is refused with name, value and limit: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(expect.objectContaining({ input, value }) as Error);
	});

	it('counts kelvin from −273.15 °C', () => {
		expect(radiateBetween(1, -KELVIN_AT_ZERO_C, -KELVIN_AT_ZERO_C)).toBe(0);
	});
});
