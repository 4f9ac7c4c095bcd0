import { describe, expect, it } from 'vitest';
import * as wiring from '../../src/lib/thermal/wiring';
import type { CableAndFuse, CableCheck } from '../../src/lib/thermal/wiring';
import { checkAgainst } from './support/check-against';

const { fuseContinuousA, fuseRatingAtA, fuseSurelyOpensA, sizeCableAndFuse, WIRING_SOURCES } = wiring;

describe('fuses in warm air', () => {
	const PRACTICE: [number, number][] = [
		[-40, 1.12],
		[23, 1],
		[65, 0.92],
		[85, 0.88],
		[125, 0.8]
	];
	for (const [airC, expected] of PRACTICE) {
		checkAgainst(
			{
				name: `share of its rating that a fuse has at ${airC} °C`,
				source: 'typical curves of blade and bolted fuses',
				place: 'rating against ambient temperature',
				standing: 'common practice',
				expected,
				unit: '',
				tolerance: { absolute: 0.03 },
				because: "makers' curves differ by some hundredths"
			},
			() => fuseRatingAtA(1, airC)
		);
	}

	it('carry for years less than they are worth, and surely open above it', () => {
		expect(fuseContinuousA(100, 60)).toBeLessThan(fuseRatingAtA(100, 60));
		expect(fuseSurelyOpensA(100, 60)).toBeGreaterThan(fuseRatingAtA(100, 60));
	});

	it('are refused outside their curve', () => {
		expect(() => fuseRatingAtA(0, 23)).toThrow('ratedA is 0');
		expect(() => fuseContinuousA(10, 126)).toThrow('airC is 126');
		expect(() => fuseSurelyOpensA(10, -41)).toThrow('airC is -41');
	});
});

const GOOD: CableAndFuse = {
	areaMm2: 16,
	insulationC: 90,
	laying: 'in a tube',
	conductorLengthM: 8,
	continuousA: 40,
	cableAirC: 60,
	fuseAirC: 50,
	fuseRatedA: 60,
	nominalV: 12.8,
	acceptedDrop: 0.04
};

function failing(change: Partial<CableAndFuse>): CableCheck[] {
	return sizeCableAndFuse({ ...GOOD, ...change })
		.findings.filter(({ holds }) => !holds)
		.map(({ check }) => check);
}

describe('a proposed cable and fuse', () => {
	it('is worked out by hand', () => {
		// 100 A × √(30/60); 60 + 30 × (40/70.71)² = 69.6 °C; 40 A × 8 m × 1.21 mΩ/m × 1.1949.
		const sizing = sizeCableAndFuse(GOOD);
		expect(sizing.allowedA).toBeCloseTo(70.711, 3);
		expect(sizing.conductorC).toBeCloseTo(69.6, 6);
		expect(sizing.voltageDropV).toBeCloseTo(0.46267, 4);
		expect(sizing.fuseRatingThereA).toBeCloseTo(56.76, 10);
		expect([sizing.protectsCable, sizing.opensWithoutFault]).toEqual([true, false]);
		expect(failing({})).toEqual([]);
	});

	it.each<[string, Partial<CableAndFuse>, CableCheck[]]>([
		['too long a run', { conductorLengthM: 12 }, ['voltage drop is accepted']],
		[
			'too large a fuse',
			{ fuseRatedA: 100 },
			['fuse rating is within the cable', 'fuse opens before the cable is hurt']
		],
		['a fuse a little too large', { fuseRatedA: 80 }, ['fuse rating is within the cable']],
		['too small a fuse', { fuseRatedA: 50 }, ['fuse holds the current']],
		['a fuse in hotter air than thought', { fuseAirC: 120 }, ['fuse holds the current']],
		[
			'air that takes most of the cable',
			{ cableAirC: 85 },
			['cable carries the current', 'fuse rating is within the cable', 'fuse opens before the cable is hurt']
		],
		[
			'a fuse that the cold makes greater',
			{ fuseRatedA: 65, fuseAirC: -30 },
			['fuse rating is within the cable']
		]
	])('with %s fails where it should', (_, change, expected) => {
		expect(failing(change)).toEqual(expected);
	});

	it('says of each finding what was held against what', () => {
		const { findings } = sizeCableAndFuse(GOOD);
		expect(findings.map(({ check, unit }) => [check, unit])).toEqual([
			['cable carries the current', 'A'],
			['voltage drop is accepted', 'V'],
			['fuse rating is within the cable', 'A'],
			['fuse opens before the cable is hurt', 'A'],
			['fuse holds the current', 'A']
		]);
		for (const { holds, value, limit } of findings) expect(holds).toBe(value <= limit);
	});

	it('has nothing to carry in air as warm as its insulation may be', () => {
		const { allowedA, conductorC, protectsCable } = sizeCableAndFuse({ ...GOOD, cableAirC: 95 });
		expect([allowedA, conductorC, protectsCable]).toEqual([0, null, false]);
	});

	it('drops more when it is warmer, and no more than at its limit when it is overloaded', () => {
		const drop = (change: Partial<CableAndFuse>) => sizeCableAndFuse({ ...GOOD, ...change }).voltageDropV;
		expect(drop({ cableAirC: 75 })).toBeGreaterThan(drop({}));
		expect(drop({ continuousA: 200 }) / 200).toBeCloseTo(drop({ continuousA: 70.7107 }) / 70.7107, 6);
	});

	it('is refused when a figure cannot be', () => {
		expect(() => failing({ conductorLengthM: -1 })).toThrow('conductorLengthM is -1');
		expect(() => failing({ continuousA: NaN })).toThrow('continuousA is NaN');
		expect(() => failing({ acceptedDrop: 0 })).toThrow('acceptedDrop is 0');
		expect(() => failing({ areaMm2: 400 })).toThrow('areaMm2 is 400');
	});
});

describe('the table of sources', () => {
	it('tells of each rule by the name of its function, but for the one that stands in the sizing itself', () => {
		const names = Object.keys(WIRING_SOURCES).filter((name) => name !== 'overload');
		expect(names.filter((name) => typeof wiring[name as keyof typeof wiring] !== 'function')).toEqual([]);
		expect(names.length).toBeGreaterThan(5);
	});
});
