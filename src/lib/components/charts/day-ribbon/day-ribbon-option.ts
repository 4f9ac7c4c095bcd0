import type { CustomSeriesOption, LineSeriesOption } from 'echarts/charts';
import type { GridComponentOption } from 'echarts/components';
import type { ComposeOption } from 'echarts/core';
import { drawBand, drawDarkHours, drawHourAxis, drawTemperatureAxis } from './axes';
import { drawCurves, type DrawnCurve } from './curves';
import { layOutFrame, type RibbonFrame, type RibbonSize, type RibbonSpan } from './frame';
import { drawLimits, layOutLimits } from './limits';
import { marksSeries } from './marks-series';
import { HEAT_STEPS_C, RIBBON_PALETTES, type RibbonPalette, type RibbonScheme } from './palette';
import type { RibbonData } from './ribbon-data';
import { drawStrip } from './strip';
import { drawWords } from './words';

export type RibbonOption = ComposeOption<LineSeriesOption | CustomSeriesOption | GridComponentOption>;

export interface RibbonSettings {
	size: RibbonSize;
	scheme: RibbonScheme;
	/** px; the size's own when left out. */
	width?: number;
	/** Axes shared with other ribbons. */
	span?: RibbonSpan;
}

/** The whole picture of a day as an option of the chart library: a pure function of its arguments. */
export function dayRibbonOption(data: RibbonData, settings: RibbonSettings): RibbonOption {
	const frame = layOutFrame(data, settings.size, settings.width, settings.span);
	const palette = RIBBON_PALETTES[settings.scheme];
	const curves = drawCurves(frame, data);
	const limits = layOutLimits(frame, data);
	const peak = {
		kind: 'ring',
		x: frame.x(data.peakAtHour),
		y: frame.y(data.peakCellsC),
		radiusPx: 4.6
	} as const;
	return {
		animation: false,
		grid: gridOf(frame),
		xAxis: { type: 'value', show: false, min: frame.fromHour, max: frame.toHour },
		yAxis: { type: 'value', show: false, min: frame.minC, max: frame.maxC },
		series: [
			marksSeries(palette, 1, [
				...drawDarkHours(frame, data),
				...drawTemperatureAxis(frame),
				...drawBand(frame, data)
			]),
			marksSeries(palette, 2, [
				...drawHourAxis(frame),
				...drawStrip(frame, data),
				...drawLimits(frame, limits)
			]),
			...curves
				.filter(({ name }) => name !== 'cells')
				.map((curve) => lineSeries(curve, 3, palette[curve.ink])),
			...curves.filter(({ name }) => name === 'cells').flatMap((curve) => cellsSeries(frame, curve, palette)),
			marksSeries(palette, 5, [...drawWords(frame, data, curves, limits), peak])
		]
	};
}

const gridOf = ({ plot, width, height }: RibbonFrame): GridComponentOption => ({
	left: plot.left,
	right: width - plot.right,
	top: plot.top,
	bottom: height - plot.bottom,
	outerBoundsMode: 'none'
});

function lineSeries(
	curve: DrawnCurve,
	z: number,
	color: LineColor,
	widthPx = curve.widthPx
): LineSeriesOption {
	return {
		type: 'line',
		z,
		silent: true,
		showSymbol: false,
		clip: false,
		emphasis: { disabled: true },
		data: curve.line.map(({ hour, tempC }) => [hour, tempC]),
		lineStyle: {
			color,
			width: widthPx,
			type: curve.dash.length ? curve.dash : 'solid',
			cap: curve.dash.length ? 'butt' : 'round',
			join: 'round'
		}
	};
}

type LineColor = NonNullable<LineSeriesOption['lineStyle']>['color'];

/**
 * The cells' line takes its colour from its own height: the ramp stands still behind the picture. A rim keeps
 * the cool end apart from light paper and the hot end apart from dark paper.
 */
function cellsSeries(frame: RibbonFrame, curve: DrawnCurve, palette: RibbonPalette): LineSeriesOption[] {
	const [coolC, hotC] = [HEAT_STEPS_C[0], HEAT_STEPS_C[4]];
	const ramp: LineColor = {
		type: 'linear',
		global: true,
		x: 0,
		x2: 0,
		y: frame.y(coolC),
		y2: frame.y(hotC),
		colorStops: HEAT_STEPS_C.map((tempC, i) => ({
			offset: (tempC - coolC) / (hotC - coolC),
			color: palette.heat[i] as string
		}))
	};
	return [lineSeries(curve, 4, palette.muted, curve.widthPx + 1.5), lineSeries(curve, 4, ramp)];
}
