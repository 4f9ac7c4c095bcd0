import { describe, expect, it } from 'vitest';
import {
	CRITICAL_REYNOLDS,
	nusseltCylinderAllSpeeds,
	nusseltCylinderBanded,
	nusseltPlateLaminar,
	nusseltPlateMixed,
	reynolds
} from '../../src/lib/thermal/correlations/forced-convection';
import {
	nusseltHorizontalCylinder,
	nusseltHorizontalPlate,
	nusseltVerticalPlate,
	nusseltVerticalPlateLaminar,
	rayleigh
} from '../../src/lib/thermal/correlations/natural-convection';
import { EngineInputError } from '../../src/lib/thermal/correlations/require';
import { readCases } from './support/reference-data';

type Formula = (...inputs: number[]) => number;

const plate = (re: number, pr: number) =>
	re <= CRITICAL_REYNOLDS ? nusseltPlateLaminar(re, pr) : nusseltPlateMixed(re, pr);

function heatOfStrip(
	speed: number,
	from: number,
	to: number,
	nu: number,
	k: number,
	pr: number,
	differenceK: number
) {
	const upTo = (length: number) =>
		length === 0 ? 0 : k * differenceK * plate(reynolds(speed, length, nu), pr);
	return upTo(to) - upTo(from);
}

const FORMULAS: Record<string, Formula> = {
	reynolds,
	'plate laminar': nusseltPlateLaminar,
	'plate mixed': nusseltPlateMixed,
	'heat of a strip': heatOfStrip as Formula,
	'cylinder banded': nusseltCylinderBanded,
	'cylinder all speeds': nusseltCylinderAllSpeeds,
	rayleigh: (differenceK, lengthM, expansionPerK, kinematicViscosityM2PerS, diffusivityM2PerS) =>
		rayleigh(differenceK!, lengthM!, {
			expansionPerK: expansionPerK!,
			kinematicViscosityM2PerS: kinematicViscosityM2PerS!,
			diffusivityM2PerS: diffusivityM2PerS!
		}),
	'vertical plate': nusseltVerticalPlate,
	'vertical plate laminar': nusseltVerticalPlateLaminar,
	'horizontal plate up': (ra) => nusseltHorizontalPlate(ra!, 'hot-up'),
	'horizontal plate down': (ra) => nusseltHorizontalPlate(ra!, 'hot-down'),
	'horizontal cylinder': nusseltHorizontalCylinder
};

describe('convection against worked examples', () => {
	it.each(readCases('convection').map((example) => [example.id, example.source, example] as const))(
		'%s (%s)',
		(_id, _source, { formula, inputs, expected, relativeTolerance }) => {
			const value = FORMULAS[formula]!(...(inputs as number[]));
			expect(Math.abs(value / expected - 1)).toBeLessThan(relativeTolerance);
		}
	);

	it('leaves no formula without an example', () => {
		const used = new Set(readCases('convection').map(({ formula }) => formula));
		expect([...used].sort()).toEqual(Object.keys(FORMULAS).sort());
	});
});

describe('convection at its limits', () => {
	it('passes from the laminar to the mixed plate without a jump at the critical Reynolds number', () => {
		const laminar = nusseltPlateLaminar(CRITICAL_REYNOLDS, 0.7);
		expect(nusseltPlateMixed(CRITICAL_REYNOLDS, 0.7) / laminar).toBeCloseTo(1, 2);
	});

	it('tends to conduction through still fluid round a cylinder in hardly any flow (0.3, eq. 7.54)', () => {
		expect(nusseltCylinderAllSpeeds(1e-5, 1e5)).toBeCloseTo(0.3, 0);
	});

	it('tends to the laws’ constants without buoyancy (0.825² and 0.60²)', () => {
		expect(nusseltVerticalPlate(1e-30, 0.7)).toBeCloseTo(0.825 ** 2, 3);
		expect(nusseltHorizontalCylinder(1e-30, 0.7)).toBeCloseTo(0.36, 3);
	});

	it('agrees between the two vertical plate laws within 7 % where nothing is turbulent yet, and lies higher beyond', () => {
		const ratio = (ra: number) => nusseltVerticalPlate(ra, 0.7) / nusseltVerticalPlateLaminar(ra, 0.7);
		for (const ra of [1e4, 1e5, 1e6, 1e7]) expect(Math.abs(ratio(ra) - 1)).toBeLessThan(0.07);
		expect(ratio(1e9)).toBeGreaterThan(1.2);
	});

	it('agrees between the two cylinder laws within 20 %, as far as measurements do', () => {
		for (const re of [100, 1e3, 1e4, 1e5]) {
			expect(
				Math.abs(nusseltCylinderBanded(re, 0.7, 0.7) / nusseltCylinderAllSpeeds(re, 0.7) - 1)
			).toBeLessThan(0.2);
		}
	});
});

describe('convection as it must behave', () => {
	it('grows with speed and with warmth', () => {
		const rising = (values: number[]) => values.every((value, at) => at === 0 || value > values[at - 1]!);
		const res = [10, 100, 1e3, 1e4, 1e5, 4.9e5];
		expect(rising(res.map((re) => nusseltPlateLaminar(re, 0.7)))).toBe(true);
		expect(rising(res.map((re) => nusseltCylinderAllSpeeds(re, 0.7)))).toBe(true);
		expect(rising([1e4, 1e6, 1e8, 1e10].map((ra) => nusseltVerticalPlate(ra, 0.7)))).toBe(true);
	});

	it('leaves more heat from a hot face that looks up than from one that looks down', () => {
		for (const ra of [1e5, 1e7, 1e9]) {
			expect(nusseltHorizontalPlate(ra, 'hot-up')).toBeGreaterThan(nusseltHorizontalPlate(ra, 'hot-down'));
		}
	});
});

describe('convection outside its range', () => {
	it.each([
		['a laminar plate beyond the critical Reynolds number', () => nusseltPlateLaminar(6e5, 0.7), 're', 6e5],
		['a mixed plate below it', () => nusseltPlateMixed(4e5, 0.7), 're', 4e5],
		['a plate of liquid metal', () => nusseltPlateLaminar(1e4, 0.01), 'pr', 0.01],
		['a cylinder in a creeping flow', () => nusseltCylinderAllSpeeds(0.1, 0.7), 'peclet', 0.1 * 0.7],
		['a cylinder beyond the last band', () => nusseltCylinderBanded(2e6, 0.7, 0.7), 're', 2e6],
		['a plate without warmth', () => nusseltVerticalPlate(0, 0.7), 'ra', 0],
		['a hot face down with too much warmth', () => nusseltHorizontalPlate(1e11, 'hot-down'), 'ra', 1e11],
		['a speed that is no number', () => reynolds(NaN, 1, 1), 'speedMPerS', NaN]
	] as const)('is refused with name, value and limit: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(
			expect.objectContaining({ input, value, limit: expect.any(String) as string }) as Error
		);
	});
});
