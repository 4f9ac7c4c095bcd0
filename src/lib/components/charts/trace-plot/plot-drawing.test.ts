import { describe, expect, it } from 'vitest';
import type { CurveView } from '../../../schemas/traces';
import { drawLine, drawPlot, moveWindow, timeScale, zoomWindow } from './plot-drawing';

const CLOCK = { timeBase: 'elapsed', timeZone: null, startS: 0, startHour: 8 } as const;
const CURVE: CurveView = {
	...{ fromS: 0, toS: 240, stepS: 60 },
	curves: [
		{
			...{ channel: 'cellC', timeS: [30, 90, 150, 210] },
			...{ mean: [20, 30, null, 40], min: [19, 30, null, 40], max: [21, 31, null, 40] }
		},
		{
			...{ channel: 'speedKmh', timeS: [30, 90, 150, 210] },
			...{ mean: [0, 0, 50, 50], min: [0, 0, 50, 50], max: [0, 0, 50, 50] }
		}
	]
};

describe('the picture of a trace', () => {
	it('has a panel for each quantity, its line broken where nothing was measured', () => {
		const { panels } = drawPlot(CURVE, CLOCK, 800);
		expect(panels.map(({ quantity, title }) => [quantity, title])).toEqual([
			['temperature', '°C'],
			['speed', 'km/h']
		]);
		const [cells] = panels[0]!.lines;
		expect(cells!.line.match(/M/g)).toHaveLength(2);
		expect(cells!.band.match(/Z/g)).toHaveLength(2);
		expect(panels[1]!.lines[0]!.band).toBe('');
		expect(panels[0]!.bottom).toBeLessThan(panels[1]!.top);
	});

	it('draws hotter higher, and every value within its panel', () => {
		const [{ top, bottom, ticks, lines }] = drawPlot(CURVE, CLOCK, 800).panels as [
			ReturnType<typeof drawPlot>['panels'][number]
		];
		const heights = [...lines[0]!.band.matchAll(/[ML]([\d.]+) ([\d.]+)/g)].map((match) => Number(match[2]));
		expect(Math.min(...heights)).toBeGreaterThanOrEqual(top);
		expect(Math.max(...heights)).toBeLessThanOrEqual(bottom);
		expect(ticks[0]!.y).toBeGreaterThan(ticks.at(-1)!.y);
	});

	it('knows which time stands at a place', () => {
		const { xOf, atOf } = timeScale(CURVE, 800);
		expect(atOf(xOf(77))).toBeCloseTo(77, 9);
	});

	it('shows a point alone as a dot', () => {
		expect(drawLine([[1, 2], null, [3, 4], [5, 6]])).toBe('M1 2h0.5M3 4L5 6');
	});
});

describe('the window', () => {
	const whole = { fromS: 100, toS: 4100 };

	it('comes nearer about its middle, goes back to the whole, and never beyond it', () => {
		expect(zoomWindow(whole, whole, 0.5)).toEqual({ fromS: 1100, toS: 3100 });
		expect(zoomWindow({ fromS: 1100, toS: 3100 }, whole, 2)).toEqual(whole);
		expect(zoomWindow({ fromS: 3500, toS: 4100 }, whole, 2)).toEqual({ fromS: 2900, toS: 4100 });
		expect(zoomWindow({ fromS: 1000, toS: 1030 }, whole, 0.1)).toEqual({ fromS: 1005, toS: 1025 });
	});

	it('moves along by shares of itself, up to the ends', () => {
		expect(moveWindow({ fromS: 1100, toS: 2100 }, whole, 0.5)).toEqual({ fromS: 1600, toS: 2600 });
		expect(moveWindow({ fromS: 3600, toS: 4100 }, whole, 0.5)).toEqual({ fromS: 3600, toS: 4100 });
	});
});
