import { formatNumber } from '../../../format/numbers';
import { hatchPath, pathOf, widthOf } from './geometry';
import { lineOf, type RibbonFrame } from './frame';
import type { Mark } from './marks';
import type { RibbonData } from './ribbon-data';

const TICK_PX = 5;

export function drawTemperatureAxis(frame: RibbonFrame): Mark[] {
	const { plot, spec } = frame;
	const rules = frame.tempTicksC.flatMap((tempC): Mark[] => {
		const y = frame.y(tempC);
		return [
			{
				kind: 'path',
				d: pathOf([
					{ x: plot.left, y },
					{ x: plot.right, y }
				]),
				stroke: 'rule',
				widthPx: 1
			},
			axisWords(frame, formatNumber(tempC), plot.left - 7, y, 'right')
		];
	});
	return [...rules, axisWords(frame, '°C', plot.left - 7, plot.top - spec.fontPx * 0.6, 'right')];
}

export function drawHourAxis(frame: RibbonFrame): Mark[] {
	const { plot, spec } = frame;
	return frame.ticks.flatMap(({ x, word, align }): Mark[] => [
		{
			kind: 'path',
			d: pathOf([
				{ x, y: plot.bottom },
				{ x, y: plot.bottom + TICK_PX }
			]),
			stroke: 'muted',
			widthPx: 1
		},
		axisWords(frame, word, x, plot.bottom + TICK_PX + spec.fontPx * 0.85, align)
	]);
}

function axisWords(
	frame: RibbonFrame,
	text: string,
	x: number,
	y: number,
	align: 'left' | 'center' | 'right'
): Mark {
	return { kind: 'words', text, x, y, align, fontPx: frame.spec.fontPx, fill: 'muted' };
}

/** The dark hours, hatched from the top of the plot to its foot. */
export function drawDarkHours(frame: RibbonFrame, { darkSpans }: RibbonData): Mark[] {
	return darkSpans.flatMap((span): Mark[] => {
		const left = Math.max(frame.x(span.fromHour), frame.plot.left);
		const right = Math.min(frame.x(span.toHour), frame.plot.right);
		const box = { ...frame.plot, left, right: Math.max(right, left + 1) };
		const edges = [box.left, ...(span.open ? [] : [box.right])];
		const sides = edges
			.map((x) =>
				pathOf([
					{ x, y: box.top },
					{ x, y: box.bottom }
				])
			)
			.join('');
		if (widthOf(box) < 1) return [];
		return [
			{ kind: 'path', d: hatchPath(box, frame.spec.hatchPx), stroke: 'muted', widthPx: 0.6 },
			{ kind: 'path', d: sides, stroke: 'muted', widthPx: 0.6 }
		];
	});
}

/** Where the cells may lie: half of all days in the darker part, nine in ten in both. */
export function drawBand(frame: RibbonFrame, { band }: RibbonData): Mark[] {
	if (!band) return [];
	const between = (lowC: number[], highC: number[]): Mark => {
		const top = lineOf(frame, band, highC);
		const foot = lineOf(frame, band, lowC).reverse();
		return { kind: 'band', d: `${pathOf([...top, ...foot])}Z` };
	};
	return [between(band.lowC, band.highC), between(band.lowerC, band.upperC)];
}
