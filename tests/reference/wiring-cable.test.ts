import { describe, expect, it } from 'vitest';
import {
	ambientFactor,
	ampacityA,
	cableResistanceOhm,
	conductorTempC,
	copperResistanceOhm,
	copperWarmth,
	INSULATION_CLASSES_C,
	LARGEST_AREA_MM2,
	shortCircuitFactor,
	shortCircuitWithstandS,
	SMALLEST_AREA_MM2,
	tableAmpacityA,
	type InsulationC
} from '../../src/lib/thermal/wiring';
import { checkAgainst } from './support/check-against';
import { readTable } from './support/reference-data';

const ROUNDED = {
	tolerance: { absolute: 0.006 },
	because: 'the tables have two digits after the point, some of them cut instead of rounded'
};

describe('correction factors for warm air', () => {
	for (const { conductorC, airC, factor } of readTable('cable-tables/ambient-30.csv')) {
		checkAgainst(
			{
				name: `cable of ${conductorC} °C in air of ${airC} °C, table for 30 °C`,
				source: 'IEC 60364-5-52:2009',
				place: 'Table B.52.14',
				standing: 'from memory',
				expected: Number(factor),
				unit: '',
				...ROUNDED
			},
			() => ambientFactor(Number(conductorC), Number(airC), 30)
		);
	}
	for (const { conductorC, airC, factor } of readTable('cable-tables/ambient-45.csv')) {
		checkAgainst(
			{
				name: `cable of ${conductorC} °C in air of ${airC} °C, table for 45 °C`,
				source: "a cable maker's technical page after IEC 60092-352",
				place: 'correction factors for ambient air',
				standing: 'read in the source',
				expected: Number(factor),
				unit: '',
				...ROUNDED
			},
			() => ambientFactor(Number(conductorC), Number(airC), 45)
		);
	}

	it('end where the air is as warm as the insulation may be', () => {
		expect(ambientFactor(90, 90, 30)).toBe(0);
		expect(ambientFactor(90, 120, 30)).toBe(0);
		expect(ampacityA(16, 90, 'in a tube', 95)).toBe(0);
	});

	it('are refused when the table itself would be too warm', () => {
		expect(() => ambientFactor(70, 20, 70)).toThrow(
			'referenceC is 70: it must be below the 70 that the conductor may be.'
		);
		expect(() => ambientFactor(70, -61, 30)).toThrow('airC is -61');
	});
});

describe('currents that cables bear for years', () => {
	const AREAS = [1.5, 2.5, 4, 6, 10, 16, 25, 35, 50, 70, 95, 120];

	it('grow with the section, slower than it', () => {
		for (const insulationC of INSULATION_CLASSES_C) {
			for (const laying of ['in a tube', 'in free air'] as const) {
				const currents = AREAS.map((area) => tableAmpacityA(area, insulationC, laying));
				for (let k = 1; k < AREAS.length; k++) {
					expect(currents[k]!).toBeGreaterThan(currents[k - 1]!);
					expect(currents[k]! / currents[k - 1]!).toBeLessThan(AREAS[k]! / AREAS[k - 1]!);
				}
			}
		}
	});

	it('lie between those of the neighbours for sections between', () => {
		const between = tableAmpacityA(13.5, 90, 'in free air');
		expect(between).toBeGreaterThan(86);
		expect(between).toBeLessThan(115);
		expect(tableAmpacityA(13.5, 90, 'in free air')).toBeCloseTo(86 * (115 / 86) ** LOG_SHARE, 10);
	});

	it('are more in the open, with better insulation, in cooler air', () => {
		expect(tableAmpacityA(16, 90, 'in free air')).toBeGreaterThan(tableAmpacityA(16, 90, 'in a tube'));
		const byClass = INSULATION_CLASSES_C.map((insulationC) => tableAmpacityA(16, insulationC, 'in free air'));
		expect([...byClass].sort((a, b) => a - b)).toEqual(byClass);
		expect(ampacityA(16, 90, 'in free air', 20)).toBeGreaterThan(ampacityA(16, 90, 'in free air', 60));
	});

	it('fall by half where three quarters of the warmth are used up by the air', () => {
		expect(ampacityA(35, 90, 'in a tube', 75) / ampacityA(35, 90, 'in a tube', 30)).toBeCloseTo(0.5, 12);
	});

	it('are refused outside the tables', () => {
		expect(() => tableAmpacityA(1, 90, 'in a tube')).toThrow('areaMm2 is 1: it must be within 1.5 to 120.');
		expect(() => tableAmpacityA(16, 80 as InsulationC, 'in a tube')).toThrow(
			'insulationC is 80: it must be one of'
		);
		expect(() => ampacityA(16, 90, 'in a tube', NaN)).toThrow('airC is NaN');
	});
});

/** Where 13.5 mm² lies between 10 and 16 mm² in logarithms. */
const LOG_SHARE = Math.log(13.5 / 10) / Math.log(16 / 10);

describe('warmth of a loaded conductor', () => {
	it('grows with the square of the current, and is the limit at the limit', () => {
		expect(conductorTempC(0, 80, 90, 50)).toBe(50);
		expect(conductorTempC(40, 80, 90, 50)).toBeCloseTo(60, 12);
		expect(conductorTempC(80, 80, 90, 50)).toBeCloseTo(90, 12);
	});

	it('is refused in air that is too warm by itself', () => {
		expect(() => conductorTempC(1, 80, 90, 91)).toThrow('airC is 91');
		expect(() => conductorTempC(1, 0, 90, 50)).toThrow('allowedA is 0');
	});
});

describe('resistance of copper', () => {
	for (const { areaMm2, ohmPerKm } of readTable('cable-tables/class-5.csv')) {
		checkAgainst(
			{
				name: `greatest resistance of flexible cable of ${areaMm2} mm²`,
				source: 'IEC 60228, in two pages that quote it',
				place: 'Table 3, class 5, plain copper at 20 °C',
				standing: 'read in the source',
				expected: Number(ohmPerKm),
				unit: 'Ω/km',
				tolerance: { relative: 1e-12 },
				because: 'the same table'
			},
			() => cableResistanceOhm(Number(areaMm2), 1000, 20)
		);
	}

	/** The standard's factors bring a resistance back to 20 °C. */
	const BACK_TO_20: [number, number][] = [
		[5, 1.064],
		[30, 0.962],
		[50, 0.893],
		[70, 0.833],
		[90, 0.781],
		[100, 0.758]
	];
	for (const [tempC, factor] of BACK_TO_20) {
		checkAgainst(
			{
				name: `factor that brings the resistance at ${tempC} °C back to 20 °C`,
				source: 'IEC 60228, in a page that quotes it',
				place: 'table of temperature correction factors',
				standing: 'read in the source',
				expected: factor,
				unit: '',
				tolerance: { relative: 0.006 },
				because: 'the table rounds the coefficient to 0.004 per kelvin'
			},
			() => 1 / copperWarmth(tempC)
		);
	}

	checkAgainst(
		{
			name: 'resistance of 10 m of 16 mm² from the section alone',
			source: 'IEC 60287-1-1',
			place: 'Table 1, resistivity 1.7241e-8 Ω m',
			standing: 'from memory',
			expected: 0.010776,
			unit: 'Ω',
			tolerance: { relative: 0.003 },
			because: 'the resistivity is rounded to 0.0172 Ω mm²/m as in daily use'
		},
		() => copperResistanceOhm(16, 10, 20)
	);

	it('is between 10 and 16 % more in flexible cable than its section says', () => {
		for (const area of [1.5, 4, 10, 25, 50, 95, 120]) {
			const ratio = cableResistanceOhm(area, 1, 20) / copperResistanceOhm(area, 1, 20);
			expect(ratio).toBeGreaterThan(1.1);
			expect(ratio).toBeLessThan(1.165);
		}
	});

	it('grows with length and warmth', () => {
		expect(cableResistanceOhm(10, 6, 45)).toBeCloseTo(2 * cableResistanceOhm(10, 3, 45), 15);
		expect(cableResistanceOhm(10, 3, 90)).toBeGreaterThan(cableResistanceOhm(10, 3, 45));
	});

	it('is refused outside its limits', () => {
		expect(() => copperResistanceOhm(0, 1, 20)).toThrow('areaMm2 is 0');
		expect(() => cableResistanceOhm(LARGEST_AREA_MM2 + 1, 1, 20)).toThrow('areaMm2 is 121');
		expect(() => cableResistanceOhm(SMALLEST_AREA_MM2, -1, 20)).toThrow('lengthM is -1');
		expect(() => copperWarmth(251)).toThrow('conductorC is 251');
	});
});

describe('short circuits', () => {
	const rows = readTable('cable-tables/withstand.csv');
	for (const { initialC, finalC, k } of rows) {
		checkAgainst(
			{
				name: `factor k of copper from ${initialC} to ${finalC} °C`,
				source: 'IEC 60364-5-54:2011',
				place: 'Tables A.54.2 to A.54.4',
				standing: 'from memory',
				expected: Number(k),
				unit: 'A s^½/mm²',
				tolerance: { absolute: 0.5 },
				because: 'the tables have whole numbers'
			},
			() => shortCircuitFactor(Number(initialC), Number(finalC))
		);
	}

	it('are borne four times as long at half the current, and with twice the section', () => {
		expect(shortCircuitWithstandS(16, 115, 1000) / shortCircuitWithstandS(16, 115, 2000)).toBeCloseTo(4, 12);
		expect(shortCircuitWithstandS(32, 115, 1000) / shortCircuitWithstandS(16, 115, 1000)).toBeCloseTo(4, 12);
	});

	it('are refused when they do not warm', () => {
		expect(() => shortCircuitFactor(90, 90)).toThrow('finalC is 90: it must be above 90.');
		expect(() => shortCircuitWithstandS(16, 115, 0)).toThrow('currentA is 0');
	});
});
