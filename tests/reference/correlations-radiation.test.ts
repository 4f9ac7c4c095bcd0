import { describe, expect, it } from 'vitest';
import {
	balanceAiredShield,
	EngineInputError,
	exchangeAreaConcentric,
	exchangeFactorParallel,
	floatingShieldTempsC,
	KELVIN_AT_ZERO_C,
	radiateBetween,
	radiativeConductance,
	solveGreyEnclosure,
	viewFactorBack,
	viewFactorCoaxialDiscs,
	viewFactorLongStrips,
	viewFactorParallelRectangles,
	viewFactorPerpendicularRectangles,
	type GreySurface,
	type SectionStrip
} from '../../src/lib/thermal/correlations';

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

const HOT = { tempC: 500, emissivity: 0.8 };
const COLD = { tempC: 60, emissivity: 0.9 };
const NOTHING = { areaM2: 0, emissivity: 1 };
const POINT: SectionStrip = [
	[1, 1],
	[1, 1]
];
const FLOOR: SectionStrip = [
	[0, 2],
	[1, 2]
];
const PLATES: GreySurface[] = [
	{ areaM2: 1, emissivity: 0.5, tempC: 100 },
	{ areaM2: 1, emissivity: 0.5, tempC: 0 }
];
const INSULATED = PLATES.map((plate) => ({ ...plate, tempC: null }));
const FACING = [
	[0, 1],
	[1, 0]
];
const HALF_SEEN = [
	[0, 0.5],
	[1, 0]
];
const ONE_WAY = [
	[0, 1],
	[0.5, 0.5]
];

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
		['a rectangle without width', () => viewFactorPerpendicularRectangles(1, 0, 1), 'width1M', 0],
		['a strip without width', () => viewFactorLongStrips(POINT, FLOOR), 'strip1WidthM', 0],
		['a view factor beyond one', () => viewFactorBack(1.1, 1, 1), 'viewFactor12', 1.1],
		[
			'a film below zero',
			() => balanceAiredShield(HOT, COLD, { faces: [0.1, 0.1], filmsWPerM2K: [-1, 8], airC: [20, 20] }),
			'film1WPerM2K',
			-1
		],
		[
			'a plane below absolute zero',
			() => floatingShieldTempsC({ ...HOT, tempC: -300 }, COLD, []),
			'hotC',
			-300
		],
		[
			'a shell without area',
			() => exchangeAreaConcentric({ areaM2: 1, emissivity: 1 }, NOTHING),
			'areaM2',
			0
		],
		[
			'view factors that do not sum to one',
			() => solveGreyEnclosure(PLATES, HALF_SEEN),
			'viewFactorSum',
			0.5
		],
		[
			'view factors against reciprocity',
			() => solveGreyEnclosure(PLATES, ONE_WAY),
			'viewFactorReciprocity',
			0.5
		],
		[
			'an enclosure without any temperature',
			() => solveGreyEnclosure(INSULATED, FACING),
			'givenTemperatures',
			0
		],
		['too few view factors', () => solveGreyEnclosure(PLATES, [[0, 1]]), 'viewFactorRows', 1]
	] as const)('is refused with name, value and limit: %s', (_, run, input, value) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(expect.objectContaining({ input, value }) as Error);
	});

	it('counts kelvin from −273.15 °C', () => {
		expect(radiateBetween(1, -KELVIN_AT_ZERO_C, -KELVIN_AT_ZERO_C)).toBe(0);
	});
});
