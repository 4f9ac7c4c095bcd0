import { describe, expect, it } from 'vitest';
import type { EnvelopeFigure, LifeCurve, MonthReport } from '../../schemas/outlook-reports';
import { drawEnvelope, ENVELOPE_BOX } from './envelope-drawing';
import { drawLife, LIFE_BOX } from './life-drawing';
import { layOutMonths, MONTHS_BOX } from './month-bars';

/** All points of a path, in its order. */
const pointsOf = (d: string): { x: number; y: number }[] =>
	[...d.matchAll(/([\d.]+) ([\d.]+)/g)].map(([, x, y]) => ({ x: Number(x), y: Number(y) }));

const month = (low: number, middle: number, high: number): MonthReport => ({
	...{ low, middle, high, name: 'May', letter: 'M', daysOnRoad: '4', warmth: '', value: '' }
});

describe('the months', () => {
	it('stand on one foot, the larger the taller, each with its range around its top', () => {
		const months = [month(0, 0, 0), month(1, 2, 4), month(2, 4, 7)];
		const { bars } = layOutMonths(months);
		expect(bars[0]!.height).toBe(0);
		expect(bars[2]!.height).toBeCloseTo(2 * bars[1]!.height, 9);
		for (const { top, lowY, highY } of bars) {
			expect(highY).toBeLessThanOrEqual(top);
			expect(lowY).toBeGreaterThanOrEqual(top);
		}
	});

	it.each([0.2, 3, 7, 19, 31])('have room for a month of %s days and a tick at the top', (days) => {
		const { bars, ticks } = layOutMonths([month(0, days, days)]);
		expect(bars[0]!.highY).toBeGreaterThanOrEqual(MONTHS_BOX.top);
		expect(ticks.at(-1)!.days).toBeGreaterThanOrEqual(days);
		expect(ticks.length).toBeLessThanOrEqual(5);
	});
});

const figure = (changes: Partial<EnvelopeFigure> = {}): EnvelopeFigure => ({
	triedC: [10, 56],
	planned: { driveHours: 9, maxC: 44 },
	points: [
		{ driveHours: 1, lowC: 44, middleC: 50, highC: 54 },
		{ driveHours: 6, lowC: 34, middleC: 40, highC: 46 },
		{ driveHours: 12, lowC: 30, middleC: 36, highC: 42 }
	],
	...changes
});

describe('the envelope', () => {
	it('keeps its line inside its band and the planned day above the line that it breaks', () => {
		const { line, band, planned } = drawEnvelope(figure());
		const middle = pointsOf(line);
		const edge = pointsOf(band);
		middle.forEach(({ y }, at) => {
			expect(edge[at]!.y).toBeLessThan(y);
			expect(edge.at(-1 - at)!.y).toBeGreaterThan(y);
		});
		expect(planned.y).toBeLessThan(middle.at(-1)!.y);
	});

	it('draws nothing outside its paper, whatever is far away', () => {
		for (const planned of [
			{ driveHours: 22, maxC: 58 },
			{ driveHours: 0.5, maxC: -4 }
		]) {
			const drawing = drawEnvelope(figure({ planned }));
			const all = [...pointsOf(drawing.line), ...pointsOf(drawing.band), drawing.planned];
			for (const { x, y } of all) {
				expect(x).toBeGreaterThanOrEqual(ENVELOPE_BOX.left);
				expect(x).toBeLessThanOrEqual(ENVELOPE_BOX.width - ENVELOPE_BOX.right);
				expect(y).toBeGreaterThanOrEqual(ENVELOPE_BOX.top);
				expect(y).toBeLessThanOrEqual(ENVELOPE_BOX.height - ENVELOPE_BOX.bottom);
			}
		}
	});

	it('has no line where even the coolest day is too hot', () => {
		const none = { lowC: null, middleC: null, highC: null };
		const drawing = drawEnvelope(figure({ points: [{ driveHours: 1, ...none }] }));
		expect(drawing).toMatchObject({ line: '', band: '' });
	});

	it('takes the band to the foot where its lower edge lies below what was tried', () => {
		const points = figure().points.map((point) => ({ ...point, lowC: null }));
		const ys = pointsOf(drawEnvelope(figure({ points })).band).map(({ y }) => y);
		expect(Math.max(...ys)).toBe(ENVELOPE_BOX.height - ENVELOPE_BOX.bottom);
	});
});

const curve = (label: string, loss: number): LifeCurve => ({
	label,
	years: Array.from({ length: 10 }, (_, at) => {
		const middle = 1 - loss * (at + 1);
		return { years: at + 1, low: middle - 0.02, middle, high: middle + 0.02 };
	})
});

describe('the life', () => {
	it('begins at the whole for all, and has a line at four fifths', () => {
		const { lines, yTicks } = drawLife([curve('Here', 0.03), curve('B: Cabin', 0.01)]);
		for (const { d } of lines) expect(pointsOf(d)[0]).toEqual({ x: LIFE_BOX.left, y: LIFE_BOX.top });
		expect(yTicks.filter(({ isWorn }) => isWorn)).toHaveLength(1);
	});

	it('keeps the labels of close lines apart and on the paper', () => {
		const close = ['Here', 'B: b', 'C: c', 'D: d', 'E: e', 'F: f'].map((label) => curve(label, 0.03));
		const ends = drawLife(close)
			.lines.map(({ endY }) => endY)
			.sort((a, b) => a - b);
		ends.slice(1).forEach((y, at) => expect(y - ends[at]!).toBeGreaterThanOrEqual(12.9));
		expect(ends.at(-1)).toBeLessThanOrEqual(LIFE_BOX.height - LIFE_BOX.bottom);
		expect(ends[0]).toBeGreaterThan(0);
	});

	it('holds a battery that is worn out at the foot', () => {
		const { lines } = drawLife([curve('Here', 0.2)]);
		const foot = LIFE_BOX.height - LIFE_BOX.bottom;
		expect(pointsOf(lines[0]!.d).at(-1)!.y).toBe(foot);
	});
});
