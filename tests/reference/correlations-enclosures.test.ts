import { describe, expect, it } from 'vitest';
import {
	balanceAiredShield,
	EngineInputError,
	exchangeAreaConcentric,
	exchangeFactorParallel,
	floatingShieldTempsC,
	radiateBetween,
	solveGreyEnclosure,
	solveLinear,
	viewFactorLongStrips,
	viewFactorParallelRectangles,
	viewFactorPerpendicularRectangles,
	type GreySurface
} from '../../src/lib/thermal/correlations';

describe('shields as they must behave', () => {
	const hot = { tempC: 500, emissivity: 0.8 };
	const cold = { tempC: 60, emissivity: 0.9 };

	it('settle between their neighbours, one after the other, each passing on what it receives', () => {
		const shields = [
			[0.1, 0.3],
			[0.05, 0.6],
			[0.9, 0.2]
		] as const;
		const temps = [500, ...floatingShieldTempsC(hot, cold, shields), 60];
		expect(temps.every((temp, at) => at === 0 || temp < temps[at - 1]!)).toBe(true);
		const faces = [0.8, ...shields.flat(), 0.9];
		const fluxes = temps
			.slice(1)
			.map((temp, at) =>
				radiateBetween(exchangeFactorParallel(faces[2 * at]!, faces[2 * at + 1]!), temps[at]!, temp)
			);
		for (const flux of fluxes) expect(flux / fluxes[0]!).toBeCloseTo(1, 9);
	});

	it('need no air to settle where radiation alone puts them', () => {
		const still = balanceAiredShield(hot, cold, { faces: [0.05, 0.2], filmsWPerM2K: [0, 0], airC: [20, 20] });
		expect(still.shieldC).toBeCloseTo(floatingShieldTempsC(hot, cold, [[0.05, 0.2]])[0]!, 8);
		expect(still.toAirWPerM2).toBe(0);
	});

	it('balance what they receive with what they pass on and what the air takes, warm air included', () => {
		for (const airC of [-20, 80, 700]) {
			const { fromHotWPerM2, toColdWPerM2, toAirWPerM2 } = balanceAiredShield(hot, cold, {
				faces: [0.3, 0.1],
				filmsWPerM2K: [12, 4],
				airC: [airC, airC + 10]
			});
			expect(fromHotWPerM2 - toColdWPerM2 - toAirWPerM2).toBeCloseTo(0, 6);
		}
	});

	it('take the temperature of the air where much of it moves', () => {
		const windy = balanceAiredShield(hot, cold, {
			faces: [0.9, 0.9],
			filmsWPerM2K: [1e7, 1e7],
			airC: [70, 90]
		});
		expect(windy.shieldC).toBeCloseTo(80, 2);
	});
});

describe('an enclosure as it must behave', () => {
	const cube = Array.from({ length: 6 }, (_, i) =>
		Array.from({ length: 6 }, (_, j) => {
			if (i === j) return 0;
			return Math.floor(i / 2) === Math.floor(j / 2)
				? viewFactorParallelRectangles(1, 1, 1)
				: viewFactorPerpendicularRectangles(1, 1, 1);
		})
	);
	const temps = [400, 20, 90, null, 60, 250];
	const box = temps.map((tempC, i): GreySurface => ({ areaM2: 1, emissivity: 0.2 + 0.15 * i, tempC }));

	it('loses nothing: the heat of all its surfaces sums to zero', () => {
		const { heatW } = solveGreyEnclosure(box, cube);
		expect(heatW.reduce((sum, heat) => sum + heat, 0)).toBeCloseTo(0, 8);
	});

	it('holds a surface that re-radiates between the coldest and the hottest, whatever its emissivity', () => {
		const finish = (emissivity: number) =>
			solveGreyEnclosure(
				box.map((surface) => (surface.tempC === null ? { ...surface, emissivity } : surface)),
				cube
			).tempC[3]!;
		expect(finish(0.05)).toBeCloseTo(finish(0.95), 9);
		expect(finish(0.5)).toBeGreaterThan(20);
		expect(finish(0.5)).toBeLessThan(400);
	});

	it('is two parallel planes when they see nothing but one another', () => {
		const planes: GreySurface[] = [
			{ areaM2: 2, emissivity: 0.8, tempC: 500 },
			{ areaM2: 2, emissivity: 0.9, tempC: 60 }
		];
		const { heatW } = solveGreyEnclosure(planes, [
			[0, 1],
			[1, 0]
		]);
		expect(heatW[0]).toBeCloseTo(radiateBetween(2 * exchangeFactorParallel(0.8, 0.9), 500, 60), 6);
	});

	it('is a body in a shell, which a large shell lets see itself as in a black room', () => {
		const body = { areaM2: 0.3, emissivity: 0.6 };
		const shell = { areaM2: 1.2, emissivity: 0.4 };
		const { heatW } = solveGreyEnclosure(
			[
				{ ...body, tempC: 300 },
				{ ...shell, tempC: 25 }
			],
			[
				[0, 1],
				[0.25, 0.75]
			]
		);
		expect(heatW[0]).toBeCloseTo(radiateBetween(exchangeAreaConcentric(body, shell), 300, 25), 6);
		expect(exchangeAreaConcentric(body, { areaM2: 1e9, emissivity: 0.4 })).toBeCloseTo(0.18, 8);
	});
});

describe('long strips', () => {
	it('of a triangular duct see each side by half, and obey reciprocity', () => {
		const top = [0.5, Math.sqrt(0.75)] as const;
		expect(
			viewFactorLongStrips(
				[
					[0, 0],
					[1, 0]
				],
				[[0, 0], top]
			)
		).toBeCloseTo(0.5, 12);
		const wide = [
			[0, 0],
			[3, 0]
		] as const;
		const narrow = [
			[1, 2],
			[2, 2]
		] as const;
		expect(3 * viewFactorLongStrips(wide, narrow)).toBeCloseTo(viewFactorLongStrips(narrow, wide), 12);
	});
});

describe('small linear systems', () => {
	it('are solved with a zero on the diagonal, and refused when they determine nothing', () => {
		expect(
			solveLinear(
				[
					[0, 2],
					[3, 1]
				],
				[4, 5]
			)
		).toEqual([1, 2]);
		const twice = [
			[1, 2],
			[2, 4]
		];
		expect(() => solveLinear(twice, [1, 2])).toThrow(EngineInputError);
	});
});
