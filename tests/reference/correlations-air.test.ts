import { describe, expect, it } from 'vitest';
import { airProperties, pressureAtAltitude } from '../../src/lib/thermal/correlations/air';
import { readTable } from './support/reference-data';

const rows = readTable('air-properties/air.csv');

/**
 * Largest relative differences. The two tables differ from one another by 2.5 % in conductivity, and the formula sits
 * with Incropera's; the specific heat is held at 1006 J/kgK, 1.5 % below the tables at 177 °C, which shows in Pr.
 */
const TOLERANCES: Record<string, Record<'density' | 'viscosity' | 'conductivity' | 'prandtl', number>> = {
	'Incropera 6th ed., Table A.4': { density: 0.001, viscosity: 0.01, conductivity: 0.005, prandtl: 0.02 },
	'Cengel, Table A-15': { density: 0.001, viscosity: 0.01, conductivity: 0.027, prandtl: 0.037 }
};

describe('air against two handbooks', () => {
	it.each(rows.map((row) => [row.source!, Number(row.tempC), row] as const))(
		'%s at %f °C',
		(source, tempC, row) => {
			const air = airProperties(tempC, Number(row.pressurePa));
			const tolerance = TOLERANCES[source]!;
			const differ = (value: number, column: string) => Math.abs(value / Number(row[column]) - 1);
			expect(differ(air.densityKgPerM3, 'densityKgPerM3')).toBeLessThan(tolerance.density);
			expect(differ(air.kinematicViscosityM2PerS, 'kinematicViscosityM2PerS')).toBeLessThan(
				tolerance.viscosity
			);
			expect(differ(air.conductivityWPerMK, 'conductivityWPerMK')).toBeLessThan(tolerance.conductivity);
			expect(differ(air.prandtl, 'prandtl')).toBeLessThan(tolerance.prandtl);
		}
	);

	it('thins as pressure falls: density with it, kinematic viscosity against it', () => {
		const [sea, high] = [airProperties(20, 101_325), airProperties(20, 50_662.5)];
		expect(high.densityKgPerM3 / sea.densityKgPerM3).toBeCloseTo(0.5, 12);
		expect(high.kinematicViscosityM2PerS / sea.kinematicViscosityM2PerS).toBeCloseTo(2, 12);
		expect(high.conductivityWPerMK).toBe(sea.conductivityWPerMK);
	});

	it('is refused outside −100 to 300 °C and without pressure', () => {
		expect(() => airProperties(301, 101_325)).toThrow('tempC is 301: it must be within -100 to 300.');
		expect(() => airProperties(20, 0)).toThrow('pressurePa is 0');
	});
});

describe('the standard atmosphere (ISO 2533, table; from memory, high confidence)', () => {
	it.each([
		[0, 101_325],
		[1000, 89_874.6],
		[2000, 79_495.2],
		[5000, 54_019.9],
		[11_000, 22_632]
	])('has at %i m a pressure of %f Pa', (altitudeM, pressurePa) => {
		expect(Math.abs(pressureAtAltitude(altitudeM) / pressurePa - 1)).toBeLessThan(1e-4);
	});

	it('is refused above the layer that cools evenly', () => {
		expect(() => pressureAtAltitude(11_001)).toThrow('altitudeM is 11001');
	});
});
