import { describe, expect, it } from 'vitest';
import { airProperties, EngineInputError, pressureAtAltitude } from '../../src/lib/thermal/correlations';

describe('air as it must behave', () => {
	it('thins as pressure falls: density with it, kinematic viscosity against it', () => {
		const [sea, high] = [airProperties(20, 101_325), airProperties(20, 50_662.5)];
		expect(high.densityKgPerM3 / sea.densityKgPerM3).toBeCloseTo(0.5, 12);
		expect(high.kinematicViscosityM2PerS / sea.kinematicViscosityM2PerS).toBeCloseTo(2, 12);
		expect(high.conductivityWPerMK).toBe(sea.conductivityWPerMK);
	});

	it('is of one piece: ν = μ/ρ, α = k/(ρ cp), Pr = ν/α', () => {
		const air = airProperties(85, 95_000);
		expect(air.kinematicViscosityM2PerS).toBeCloseTo(air.dynamicViscosityPaS / air.densityKgPerM3, 15);
		expect(air.prandtl).toBeCloseTo(
			(air.dynamicViscosityPaS * air.specificHeatJPerKgK) / air.conductivityWPerMK,
			12
		);
	});

	it('presses less the higher, and never less than nothing', () => {
		const pressures = [-500, 0, 500, 3000, 11_000].map(pressureAtAltitude);
		expect(pressures.every((pressure, at) => at === 0 || pressure < pressures[at - 1]!)).toBe(true);
		expect(pressures.at(-1)).toBeGreaterThan(0);
	});
});

describe('air outside its range', () => {
	it.each([
		[
			'hotter than the formula',
			() => airProperties(301, 101_325),
			'tempC is 301: it must be within -100 to 300.'
		],
		['without pressure', () => airProperties(20, 0), 'pressurePa is 0'],
		['above the layer that cools evenly', () => pressureAtAltitude(11_001), 'altitudeM is 11001']
	])('is refused: %s', (_, run, message) => {
		expect(run).toThrow(EngineInputError);
		expect(run).toThrow(message);
	});
});
