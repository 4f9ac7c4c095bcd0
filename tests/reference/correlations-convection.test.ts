import { describe, expect, it } from 'vitest';
import {
	CRITICAL_REYNOLDS,
	EngineInputError,
	filmCoefficientWPerM2K,
	horizontalPlateLengthM,
	nusseltCylinderAllSpeeds,
	nusseltCylinderBanded,
	nusseltHorizontalCylinder,
	nusseltHorizontalCylinderBanded,
	nusseltHorizontalPlate,
	nusseltHorizontalPlateAllFluids,
	nusseltNaturalSphere,
	nusseltPlateLaminar,
	nusseltPlateLaminarAllPrandtl,
	nusseltPlateMixed,
	nusseltPlateTurbulent,
	nusseltPlateTurbulentKreith,
	nusseltSphere,
	nusseltVerticalPlate,
	nusseltVerticalPlateLaminar,
	reynolds
} from '../../src/lib/thermal/correlations';

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

	it('tends to conduction into still fluid round a sphere: Nu = 2', () => {
		expect(nusseltNaturalSphere(1e-20, 0.7)).toBeCloseTo(2, 4);
		expect(nusseltSphere(3.5, 0.7, 1, 1)).toBeLessThan(3);
	});

	it('agrees between the two laminar plate laws within 3 % for gases and liquids', () => {
		for (const pr of [0.7, 1, 5, 40]) {
			const ratio = nusseltPlateLaminarAllPrandtl(1e5, pr) / nusseltPlateLaminar(1e5, pr);
			expect(Math.abs(ratio - 1)).toBeLessThan(0.03);
		}
	});

	it('agrees between the turbulent plate laws within 12 % in air, above the mixed one, which starts laminar', () => {
		for (const re of [1e6, 3e6, 1e7]) {
			const turbulent = nusseltPlateTurbulent(re, 0.71);
			expect(Math.abs(nusseltPlateTurbulentKreith(re, 0.71) / turbulent - 1)).toBeLessThan(0.12);
			expect(nusseltPlateMixed(re, 0.71)).toBeLessThan(turbulent * 1.1);
		}
	});

	it('agrees between the two horizontal cylinder laws within 20 %, as far as measurements do', () => {
		for (const ra of [1e3, 1e5, 1e7, 1e9]) {
			const ratio = nusseltHorizontalCylinderBanded(ra) / nusseltHorizontalCylinder(ra, 0.7);
			expect(Math.abs(ratio - 1)).toBeLessThan(0.2);
		}
	});

	it('agrees between the two horizontal plate laws within 25 %, as far as measurements do', () => {
		for (const ra of [1e5, 1e6, 1e8, 1e9]) {
			const ratio = nusseltHorizontalPlateAllFluids(ra, 0.7, 'hot-up') / nusseltHorizontalPlate(ra, 'hot-up');
			expect(Math.abs(ratio - 1)).toBeLessThan(0.25);
		}
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

describe('the length of a horizontal plate', () => {
	it('is half the width or area over perimeter: the same for a long strip, half as long for a square', () => {
		expect(horizontalPlateLengthM(0.75, 1e9, 'half-width')).toBe(0.375);
		expect(horizontalPlateLengthM(0.75, 1e9, 'area-over-perimeter')).toBeCloseTo(0.375, 8);
		expect(horizontalPlateLengthM(0.4, 0.4, 'area-over-perimeter')).toBeCloseTo(0.1, 12);
		expect(horizontalPlateLengthM(0.4, 0.4, 'half-width')).toBe(0.2);
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
		['a turbulent plate too slow to be one', () => nusseltPlateTurbulent(5e4, 0.7), 're', 5e4],
		['Kreith below the critical Reynolds number', () => nusseltPlateTurbulentKreith(4e5, 0.7), 're', 4e5],
		['a laminar plate beyond it', () => nusseltPlateLaminarAllPrandtl(6e5, 0.7), 're', 6e5],
		['a sphere in too fast a flow', () => nusseltSphere(1e5, 0.7, 1, 1), 're', 1e5],
		['a sphere far too hot for its fluid', () => nusseltSphere(1e4, 0.7, 1, 4), 'viscosityRatio', 0.25],
		['a sphere with too much warmth', () => nusseltNaturalSphere(1e14, 0.7), 'ra', 1e14],
		['a cylinder beyond Morgan’s bands', () => nusseltHorizontalCylinderBanded(1e13), 'ra', 1e13],
		['any fluid on a plate too warm', () => nusseltHorizontalPlateAllFluids(1e12, 0.7, 'hot-up'), 'ra', 1e12],
		['a film without a length', () => filmCoefficientWPerM2K(10, 0.03, 0), 'lengthM', 0],
		['a speed that is no number', () => reynolds(NaN, 1, 1), 'speedMPerS', NaN]
	] as const)('is refused with name, value and limit: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(
			expect.objectContaining({ input, value, limit: expect.any(String) as string }) as Error
		);
	});
});
