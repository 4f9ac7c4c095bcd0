import { describe, expect, it } from 'vitest';
import type { MeasuredCourse, MinuteSeries, Scenario } from '../types';
import { copyScenario } from '../uncertainty/draw-scenario';
import { ambientTempC } from './climate';
import { parseScenario } from './parse-scenario';
import { runScenario } from './simulate';

const DAY: Scenario = parseScenario({
	climate: { tMax: 38 },
	start: { hour: 9, soc: 0.5 },
	legs: [
		{ minutes: 120, engineOn: true, speedKmh: 80, loadA: 5 },
		{ minutes: 180, loadA: 5 }
	]
});

function runOn(measured?: MeasuredCourse): MinuteSeries {
	const run = runScenario(measured ? { ...DAY, measured } : DAY);
	if (run.status === 'failed') throw new Error(run.reason);
	return run.minutes;
}
const readings = (count: number, read: (at: number) => number) =>
	Float64Array.from({ length: count }, (_, at) => read(at));
const furthest = (a: Float64Array, b: Float64Array): number =>
	a.reduce((most, value, at) => Math.max(most, Math.abs(value - b[at]!)), 0);
const planned = runOn();

describe('a day that was measured', () => {
	it('is the planned one where the outside air was measured to be as planned', () => {
		const valuesC = readings(61, (at) => ambientTempC(9 + at / 12, DAY.climate));
		const run = runOn({ air: { everyS: 300, valuesC } });
		expect(furthest(run.ambient, planned.ambient)).toBeLessThan(1e-9);
		expect(furthest(run.nodes.cells, planned.nodes.cells)).toBeLessThan(0.01);
		expect(furthest(run.nodes.bay, planned.nodes.bay)).toBeLessThan(0.05);
	});

	it('follows the measured air between its readings and stays at the last one after them', () => {
		const run = runOn({ air: { everyS: 600, valuesC: Float64Array.of(20, 26, 23) } });
		expect([run.ambient[0], run.ambient[5], run.ambient[10], run.ambient[15], run.ambient[200]]).toEqual([
			expect.closeTo(20, 9),
			expect.closeTo(23, 9),
			expect.closeTo(26, 9),
			expect.closeTo(24.5, 9),
			23
		]);
		expect(run.nodes.cells[0]).toBe(20);
		expect(run.nodes.cells[299]!).toBeLessThan(planned.nodes.cells[299]!);
	});

	it('starts nodes at what they were measured to be, and all others at the outside air', () => {
		const run = runOn({ startC: { cells: 41, engine: 70, shield: 50 } });
		expect([run.nodes.cells[0], run.nodes.engine[0]]).toEqual([41, 70]);
		expect(run.nodes.case[0]).toBe(planned.nodes.case[0]);
	});

	it('lets the measured current flow, and the planned one where there was no reading', () => {
		const valuesA = Float64Array.of(12, NaN, -30);
		const { currentA, soc } = runOn({ current: { everyS: 600, valuesA } });
		expect([currentA[3], currentA[15], currentA[25], currentA[40]]).toEqual([12, 35, -30, 35]);
		expect(soc[10]).toBeCloseTo(0.5 + 12 / 6 / 100, 9);
		expect(soc[20]).toBeCloseTo(soc[10]! + 35 / 6 / 100, 9);
	});

	it('warms the cells by the square of the current that was measured', () => {
		const cellsWith = (currentA: number) =>
			runOn({ current: { everyS: 300, valuesA: readings(60, () => currentA) } }).nodes.cells[299]!;
		const still = cellsWith(0);
		expect((cellsWith(-60) - still) / (cellsWith(-30) - still)).toBeCloseTo(4, 0);
		expect(cellsWith(-60)).toBeGreaterThan(still + 3);
	});

	it('keeps what was measured in a copy', () => {
		const measured = { startC: { cells: 30 } };
		expect(copyScenario({ ...DAY, measured }).measured).toEqual(measured);
		expect('measured' in copyScenario(DAY)).toBe(false);
	});

	it('is no field of a scenario that people write', () => {
		expect(() => parseScenario({ measured: {}, legs: [{ minutes: 1 }] })).toThrow('measured is not a field');
	});
});
