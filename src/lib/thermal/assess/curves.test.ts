import { describe, expect, it } from 'vitest';
import { NODE_NAMES, type MinuteSeries } from '../types';
import { thinCurves } from './curves';

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
		const curves = thinCurves(seriesOf(count));
		expect(curves.stepMin).toBe(stepMin);
		expect(curves.cellsC.length).toBeLessThanOrEqual(300);
		expect(curves.cellsC).toHaveLength(Math.floor((count - 1) / stepMin) + 1);
	});

	it('keep the value of the minute, to a hundredth', () => {
		const { cellsC, stepMin } = thinCurves(seriesOf(1441));
		expect(cellsC[100]).toBe(Math.round((100 * stepMin) / 10) / 100);
	});
});
