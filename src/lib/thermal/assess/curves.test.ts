import { describe, expect, it } from 'vitest';
import { NODE_NAMES, type MinuteSeries } from '../types';
import { defaultScenario } from '../index';
import { thinCurves } from './curves';

const SCENARIO = defaultScenario([{ minutes: 60 }]);

function seriesOf(count: number): MinuteSeries {
	const rising = () => Float64Array.from({ length: count }, (_, minute) => minute / 1000);
	return {
		startHour: 6,
		count,
		nodes: Object.fromEntries(NODE_NAMES.map((name) => [name, rising()])) as MinuteSeries['nodes'],
		ambient: rising(),
		soc: rising(),
		currentA: rising(),
		chargeOpen: new Uint8Array(count),
		dischargeOpen: new Uint8Array(count)
	};
}

describe('thinned curves', () => {
	it.each([
		[2, 1],
		[300, 1],
		[301, 2],
		[1441, 5],
		[2881, 10],
		[60 * 24 * 60 + 1, 360]
	])('of %i minutes take a step of %i minutes, and 300 points at most', (count, stepMin) => {
		const curves = thinCurves(SCENARIO, seriesOf(count));
		expect(curves.stepMin).toBe(stepMin);
		expect(curves.cellsC.length).toBeLessThanOrEqual(300);
		expect(curves.cellsC).toHaveLength(Math.floor((count - 1) / stepMin) + 1);
	});

	it('keep the value of the minute, to a hundredth', () => {
		const { cellsC, stepMin } = thinCurves(SCENARIO, seriesOf(1441));
		expect(cellsC[100]).toBe(Math.round((100 * stepMin) / 10) / 100);
	});

	it('mix the air around the battery as the position has it', () => {
		const series = seriesOf(601);
		series.nodes.bay.fill(60);
		series.nodes.enclosure.fill(50);
		series.ambient.fill(40);
		const at = (position: Partial<typeof SCENARIO.position>) =>
			thinCurves({ ...SCENARIO, position: { ...SCENARIO.position, ...position } }, series).airC;
		const inTheBay = at({ bayAirFraction: 0.85, enclosureFraction: 0, roadUplift: 0 });
		const inTheCabin = at({ bayAirFraction: 0, enclosureFraction: 1, roadUplift: 0 });
		const onTheRail = at({ bayAirFraction: 0, enclosureFraction: 0, roadUplift: 8 });
		expect(new Set(inTheBay)).toEqual(new Set([57]));
		expect(new Set(inTheCabin)).toEqual(new Set([50]));
		// From six in the morning, when the sun does nothing, to noon with 1,000 W/m².
		expect(onTheRail[0]).toBe(40);
		expect(Math.max(...onTheRail)).toBe(48);
	});
});
